using ChainSolve.Tests.Shared.Checks;
using ChainSolve.Tests.Shared.Reference;

namespace ChainSolve.Numerics.Tests.Reference;

/// <summary>The reference itself is held against the values with 25 digits and against closed forms.</summary>
public class ReferenceChainTests
{
    /// <summary>What the rounding of the rates in the files to doubles can change in a value, relative.</summary>
    private const double InputRounding = 1.5e-15;

    public static TheoryData<string> Ids => [.. CheckFiles.All.Where(c => ReferenceAnswers.Answer(c) is not null).Select(c => c.Id)];

    [Fact]
    public void Ids_OfAllFiles_CoverMostCases() => Assert.True(Ids.Count > 110, $"Only {Ids.Count} cases are answered.");

    [Theory]
    [MemberData(nameof(Ids))]
    public void Answer_OnACase_AgreesWithItsDigits(string id)
    {
        var check = CheckFiles.Find(id);
        var expected = BigFloat.Parse(check.Ask.What == "offered-traffic" ? check.Ask.Loss!.Value.ToString("R", System.Globalization.CultureInfo.InvariantCulture) : check.Expected);
        var value = ReferenceAnswers.Answer(check)!.Value;

        Assert.True(((value - expected) / expected).Abs <= InputRounding, $"{value} against {expected}, off by {(value - expected) / expected}");
    }

    [Theory]
    [InlineData(1e-12, 1e13)]
    [InlineData(1e-12, 1e-3)]
    [InlineData(0.5, 1e9)]
    public void Distribution_TwoStates_IsTheClosedForm(double failure, double time)
    {
        // A(t) = m/s + (l/s) e^(-st) with s = l + m; the power of two in 1 - e^(-st) is taken exactly by squaring.
        var chain = new ReferenceChain(2, [(0, 1, failure), (1, 0, 1.0)]);
        BigFloat sum = (BigFloat)failure + 1.0;
        var power = sum * time;
        var halvings = Math.Max(0, (int)power.LeadingPower + 2);
        var decay = BigFloat.ExpOfSmall(BigFloat.Zero - power.TimesPowerOfTwo(-halvings));
        for (var i = 0; i < halvings; i++)
        {
            decay *= decay;
        }

        var expected = failure / sum * (BigFloat.One - decay);
        var value = chain.Distribution([1, 0], time)[1];

        Assert.True(((value - expected) / expected).Abs < 1e-45);
    }
}
