using System.Globalization;
using ChainSolve.Numerics.Iteration;
using ChainSolve.Tests.Shared.Checks;

namespace ChainSolve.Numerics.Tests.Checks;

/// <summary>
/// Rows of the usual table of Erlang's loss formula: offered traffic by number of lines and loss. The printed figures are from memory;
/// a row holds if the loss it names lies between the losses at the printed traffic half a unit lower and half a unit higher.
/// </summary>
public class ErlangTableTests
{
    public static TheoryData<string> Rows =>
        [.. CheckFiles.All.Where(c => c.Ask.What == "offered-traffic" && c.Published is not null).Select(c => c.Id)];

    [Fact]
    public void Rows_OfTheTable_AreEleven() => Assert.Equal(11, Rows.Count);

    [Theory]
    [MemberData(nameof(Rows))]
    public void Loss_AtPrintedTraffic_EnclosesTheNamedLoss(string id)
    {
        var check = CheckFiles.Find(id);
        var printed = double.Parse(check.Published!, CultureInfo.InvariantCulture);
        var decimals = check.Published!.Length - check.Published.IndexOf('.', StringComparison.Ordinal) - 1;
        var half = 0.5 * Math.Pow(10, -decimals);

        Assert.InRange(check.Ask.Loss!.Value, Loss(check, printed - half), Loss(check, printed + half));
    }

    private static double Loss(CheckCase check, double traffic)
    {
        var chain = ConcreteChain.From(check.Chain! with { Traffic = traffic });
        return SolverCatalog.Stationary[0].Solve(NumericsAnswers.Build(chain), SolveContext.Default).Probabilities[^1];
    }
}
