using ChainSolve.Numerics.Absorption;
using ChainSolve.Numerics.Operators;
using ChainSolve.Numerics.Tests.Checks;
using ChainSolve.Tests.Shared.Checks;

namespace ChainSolve.Numerics.Tests.Absorption;

/// <summary>Quantiles of times to an event against closed forms and outside cases.</summary>
public class PassageQuantilesTests
{
    public static TheoryData<string> Quantiles => [.. CheckFiles.All.Where(c => c.Ask.What == "quantile").Select(c => c.Id)];

    [Theory]
    [MemberData(nameof(Quantiles))]
    public void Find_OutsideCase_HasItsDigits(string id)
    {
        var check = CheckFiles.Find(id);
        var chain = ConcreteChain.From(check.Chain!);
        var target = chain.Select(check.Ask.To!, null);
        var found = PassageQuantiles.Find(
            NumericsAnswers.Build(chain), chain.Start, [.. Enumerable.Range(0, chain.Count).Select(i => !target.Contains(i))], check.Ask.Share!.Value);
        CheckVerdict.Holds(check, new Bounded(found.Time.Value, found.Time.Bound) * check.Ask.Scale);
    }

    // Closed form of the exponential law: -ln(1 - share) / rate; for a small share x the logarithm is x + x^2/2 + ...
    [Theory]
    [InlineData(0.5, 1e-6, 0.69314718055994531)]
    [InlineData(0.75, 1e-6, 1.3862943611198906)]
    [InlineData(1e-9, 0.25, 1.0000000005e-9)]
    [InlineData(0.999755859375, 3e4, 8.3177661667193437)]
    public void Find_Exponential_ClosedForm(double share, double rate, double logarithm)
    {
        var found = Exponential(rate, share);
        Within(logarithm / rate, found.Time, 4e-16);
    }

    // A pair with one repair of 1 per unit of time: the slow decay is 2 l^2 / s1, s1 + s2 = 3 l + 1, and the fast part is gone.
    [Theory]
    [InlineData(1e-3)]
    [InlineData(1e-8)]
    public void Find_PairFarFromItsFastRate_SlowDecay(double l)
    {
        var generator = new GeneratorBuilder(3).Add(0, 1, 2 * l).Add(1, 0, 1).Add(1, 2, l).Build();
        var s1 = (1 + (3 * l) + Math.Sqrt(1 + (6 * l) + (l * l))) / 2;
        var s2 = 2 * l * l / s1;
        var truth = Math.Log(2 * s1 / (s1 - s2)) / s2;
        var found = PassageQuantiles.Find(generator, [1, 0, 0], [true, true, false], 0.5);
        Within(truth, found.Time, 2e-15);
    }

    [Fact]
    public void Find_LeavingTooUnlikely_Infinite()
    {
        var generator = new GeneratorBuilder(3).Add(0, 1, 1).Add(0, 2, 3).Build();
        var found = PassageQuantiles.Find(generator, [1, 0, 0], [true, false, true], 0.5);
        Assert.True(double.IsPositiveInfinity(found.Time.Value));
        Assert.Equal(0.25, found.ChanceOfLeaving.Value, 1e-15);
    }

    // Chance of having left by t: (1 - exp(-4 t)) / 4.
    [Fact]
    public void Find_LeavingUncertain_ClosedForm()
    {
        var generator = new GeneratorBuilder(3).Add(0, 1, 1).Add(0, 2, 3).Build();
        var found = PassageQuantiles.Find(generator, [1, 0, 0], [true, false, true], 0.2);
        Within(Math.Log(5) / 4, found.Time, 1e-15);
    }

    [Fact]
    public void Find_ShareAlreadyOutside_Zero()
    {
        var generator = new GeneratorBuilder(2).Add(0, 1, 1).Build();
        Assert.Equal(0, PassageQuantiles.Find(generator, [0.5, 0.5], [true, false], 0.5).Time.Value);
        Within(-Math.Log(0.8), PassageQuantiles.Find(generator, [0.5, 0.5], [true, false], 0.6).Time, 1e-15);
    }

    [Fact]
    public void Find_ShareOfAll_Infinite() =>
        Assert.True(double.IsPositiveInfinity(Exponential(1, 1).Time.Value));

    [Theory]
    [InlineData(0)]
    [InlineData(1.5)]
    [InlineData(double.NaN)]
    public void Find_NoShare_Throws(double share) => Assert.Throws<ArgumentOutOfRangeException>(() => Exponential(1, share));

    private static PassageQuantile Exponential(double rate, double share) =>
        PassageQuantiles.Find(new GeneratorBuilder(2).Add(0, 1, rate).Build(), [1, 0], [true, false], share);

    private static void Within(double truth, ChainSolve.Numerics.Estimates.Estimate found, double room)
    {
        Assert.True(found.IsProved);
        Assert.True(Math.Abs(found.Value - truth) <= found.Bound + (truth * room), $"{found.Value:R} against {truth:R}, bound {found.Bound:G2}");
        Assert.True(found.Bound <= truth * 1e-14, $"The bound {found.Bound:G2} is wide for {truth:R}.");
    }
}
