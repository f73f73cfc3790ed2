using ChainSolve.Cli.Answers;

namespace ChainSolve.Cli.Tests.Answers;

public class MatrixAnswerTests
{
    private static readonly MatrixAnswer Answer = new()
    {
        Model = "Unit",
        Time = 10,
        Unit = "h",
        States = ["unit: up", "unit: down"],
        Chances = [[0.9375, 0.0625], [0.5, 0.5]],
        Bounds = [[1e-15, 1e-16], [2e-15, 1e-15]],
    };

    [Fact]
    public void Write_Text_NumbersTheStates()
    {
        Assert.Equal(
            """
            P(t) at 10 h: from the state of the row to the state of the column

              1  unit: up
              2  unit: down

                 1       2
              1  0.9375  0.0625
              2  0.5     0.5

            no error above 2.0e-15

            """,
            Written("text"));
    }

    [Fact]
    public void Write_Csv_HasOneLineAPair()
    {
        Assert.Equal(
            """
            # Unit
            time [h],from,to,probability,error bound
            10,unit: up,unit: up,0.9375,1E-15
            10,unit: up,unit: down,0.0625,1E-16
            10,unit: down,unit: up,0.5,2E-15
            10,unit: down,unit: down,0.5,1E-15

            """,
            Written("csv"));
    }

    [Fact]
    public void Write_Json_HasRows()
    {
        using var document = System.Text.Json.JsonDocument.Parse(Written("json"));

        Assert.Equal(0.0625, document.RootElement.GetProperty("probabilities")[0][1].GetDouble());
        Assert.Equal(2e-15, document.RootElement.GetProperty("errorBounds")[1][0].GetDouble());
    }

    private static string Written(string format)
    {
        using var writer = new StringWriter();
        Answer.Write(writer, format);
        return writer.ToString();
    }
}
