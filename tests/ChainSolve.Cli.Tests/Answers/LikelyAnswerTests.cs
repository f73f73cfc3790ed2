using ChainSolve.Cli.Answers;

namespace ChainSolve.Cli.Tests.Answers;

public class LikelyAnswerTests
{
    private static readonly LikelyAnswer Answer = new()
    {
        Model = "Pumps",
        Time = 100,
        Unit = "h",
        StateCount = 5,
        States = [new("pump: up 2", 0.75, 1e-15), new("pump: up 1, down 1", 0.125, 1e-16)],
    };

    [Fact]
    public void Write_Text_ShowsChancesAndTheRest()
    {
        Assert.Equal(
            """
            the most likely states at 100 h

              0.75   pump: up 2
              0.125  pump: up 1, down 1

            together 0.875; 3 further states

            """,
            Written(Answer, "text"));
    }

    [Fact]
    public void Write_CsvOfTheLongRun_QuotesNames()
    {
        Assert.Equal(
            """
            # Pumps
            time [h],state,probability,error bound
            steady,pump: up 2,0.75,1E-15
            steady,"pump: up 1, down 1",0.125,1E-16

            """,
            Written(Answer with { Time = null }, "csv"));
    }

    [Fact]
    public void Write_Json_IsOneDocument()
    {
        using var document = System.Text.Json.JsonDocument.Parse(Written(Answer, "json"));

        Assert.Equal(100, document.RootElement.GetProperty("time").GetDouble());
        Assert.Equal(0.125, document.RootElement.GetProperty("states")[1].GetProperty("probability").GetDouble());
    }

    private static string Written(LikelyAnswer answer, string format)
    {
        using var writer = new StringWriter();
        answer.Write(writer, format);
        return writer.ToString();
    }
}
