using ChainSolve.Numerics;
using ChainSolve.Numerics.Estimates;
using ChainSolve.Numerics.Operators;
using ChainSolve.Tests.Shared.Files;

namespace ChainSolve.Tests.Samples;

/// <summary>The code of the README is the code between the two marks below, and gives the numbers of the closed form.</summary>
public class ReadmeTests
{
    private readonly List<object> written = [];

    [Fact]
    public void Code_OfTheReadme_GivesTheClosedForm()
    {
        Run();

        // Two independent units, each down with the chance l/(l + m); and l/s (1 - exp(-s t)) of one (closed forms, e.g. IEC 61703; from memory).
        var (l, m) = (2.0 / 8760, 1 / 12.0);
        var cold = double.Parse(((string)written[0]).Split(' ')[0], System.Globalization.CultureInfo.InvariantCulture);
        Assert.Equal(1, cold / Math.Pow(l / (l + m), 2), 1e-12);
        var down = Assert.IsType<Estimate>(written[1]);
        Assert.Equal(1, down.Value / (l / (l + m) * (1 - Math.Exp(-(l + m) * 100))), 1e-12);
    }

    [Fact]
    public void Code_OfTheReadme_IsTheCodeThatIsTested()
    {
        var own = Repository.Read("tests", "ChainSolve.Tests", "Samples", "ReadmeTests.cs");
        var tested = own.Split("// <sample>\n")[1].Split("        // </sample>")[0].Split('\n').Select(l => l.Length > 8 ? l[8..] : l.TrimStart());
        var readme = Repository.Read("README.md");
        Assert.Equal(string.Join('\n', tested).TrimEnd(), readme.Split("```csharp\n")[1].Split("```")[0].TrimEnd());
    }

    private void Run()
    {
        var Console = new Recorder(written);

        // <sample>
        var model = Model.Parse("""
            given repair = 8 h
            item pump x 2 { up -> down at 2 per y ; down -> up at 1/repair }
            measure cold = probability pump.up = 0 steady
            """);
        var cold = model.With("repair", 12).Solve("cold");
        Console.WriteLine($"{cold.Value} ± {cold.ErrorBound}");

        var chain = new MarkovChain(new GeneratorBuilder(2).Add(0, 1, 2.0 / 8760).Add(1, 0, 1 / 12.0).Build());
        Console.WriteLine(chain.TransitionMatrix(100)[0, 1]);
        // </sample>
    }

    /// <summary>Stands in for the console.</summary>
    private sealed class Recorder(List<object> written)
    {
        public void WriteLine(object value) => written.Add(value);
    }
}
