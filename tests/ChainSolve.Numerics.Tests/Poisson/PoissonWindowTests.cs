using ChainSolve.Numerics.Arithmetic;
using ChainSolve.Numerics.Poisson;
using ChainSolve.Numerics.Tests.Support;
using ChainSolve.Tests.Shared.Checks;
using ChainSolve.Tests.Shared.Reference;
using MathNet.Numerics;

namespace ChainSolve.Numerics.Tests.Poisson;

public class PoissonWindowTests
{
    public static TheoryData<string> Weights => [.. CheckFiles.All.Where(c => c.Ask.What == "poisson-weight").Select(c => c.Id)];

    public static TheoryData<string> Windows => [.. CheckFiles.All.Where(c => c.Ask.What == "poisson-window").Select(c => c.Id)];

    [Fact]
    public void Cases_OfTheFiles_AreThere() => Assert.Equal((9, 12), (Weights.Count, Windows.Count));

    [Theory]
    [MemberData(nameof(Weights))]
    public void Weight_OfACase_HasItsDigits(string id)
    {
        var check = CheckFiles.Find(id);
        var window = PoissonWindow.Of(check.Ask.Mean!.Value);

        Assert.InRange(Chains.Distance(window.Weight(check.Ask.Count!.Value), BigFloat.Parse(check.Expected)), 0, PoissonWindow.RelativeError);
    }

    [Theory]
    [MemberData(nameof(Windows))]
    public void Of_ACase_IsNoNarrowerAndHardlyWider(string id)
    {
        var ask = CheckFiles.Find(id).Ask;
        var window = PoissonWindow.Of(ask.Mean!.Value, ask.Loss!.Value);
        var slack = 2 + (0.15 * Math.Sqrt(ask.Mean.Value));

        Assert.InRange(window.Left, Math.Max(0, ask.Left!.Value - slack), ask.Left.Value);
        Assert.InRange(window.Right, ask.Right!.Value, ask.Right.Value + slack);
    }

    [Theory]
    [InlineData(1e-9)]
    [InlineData(0.3)]
    [InlineData(1)]
    [InlineData(17.25)]
    [InlineData(700)]
    public void Weight_AnyCount_IsTheExactQuotient(double mean)
    {
        // mean^k / k! over the sum of all of them, in 256 bits.
        var terms = new List<BigFloat> { BigFloat.One };
        while (terms[^1] > BigFloat.Parse("1e-320") || terms.Count < 2 * mean)
        {
            terms.Add(terms[^1] * mean / terms.Count);
        }

        var sum = terms.Aggregate(BigFloat.Zero, (s, x) => s + x);
        var window = PoissonWindow.Of(mean);
        var tail = BigFloat.Zero;
        var tails = 0.0;
        for (var k = terms.Count - 1; k >= 0; k--)
        {
            var truth = terms[k] / sum;
            if (truth > 1e-290)
            {
                Assert.InRange(Chains.Distance(window.Weight(k), truth), 0, PoissonWindow.RelativeError);
            }

            if (tail / sum > 1e-280)
            {
                Assert.InRange(Chains.Distance(window.Tail(k), tail / sum), 0, PoissonWindow.RelativeError);
                Assert.True(window.TailsBeyond(k) >= tails);
            }

            tails += (tail / sum).ToDouble();
            tail += terms[k];
        }
    }

    [Theory]
    [InlineData(0.01)]
    [InlineData(3)]
    [InlineData(150)]
    [InlineData(40_000)]
    public void WeightAndTail_AgainstMathNet_Agree(double mean)
    {
        // Outside reference: the Poisson and incomplete gamma functions of MathNet.Numerics, good for about 1e-12 here.
        var window = PoissonWindow.Of(mean);
        foreach (var shift in new[] { -3, -1, 0, 1, 3 })
        {
            var k = Math.Max(0, (long)(mean + (shift * Math.Sqrt(mean))));
            Assert.InRange(Chains.Distance(window.Weight(k), MathNet.Numerics.Distributions.Poisson.PMF(mean, (int)k)), 0, mean * 1e-14 + 1e-13);
            Assert.InRange(Chains.Distance(window.Tail(k), SpecialFunctions.GammaLowerRegularized(k + 1, mean)), 0, mean * 1e-14 + 1e-12);
        }
    }

    [Theory]
    [InlineData(0.0)]
    [InlineData(1e-300)]
    public void Of_NextToNoMean_IsAlmostSurelyZero(double mean)
    {
        var window = PoissonWindow.Of(mean);

        Assert.Equal((0, 1.0), (window.Left, window.Weight(0)));
        Assert.Equal(mean, window.Weight(1), 1e-315);
    }

    [Fact]
    public void Of_AVeryLargeMean_AddsToOneAndPeaksAtItsDensity()
    {
        const double Mean = 1e9;
        var window = PoissonWindow.Of(Mean);
        LongSum sum = default;
        for (var k = window.Left; k <= window.Right; k++)
        {
            sum.Add(window.Weight(k));
        }

        Assert.Equal(1, sum.Value, 1e-14);
        Assert.Equal(1, window.Tail(window.Left - 1));

        // Stirling's series at the mean: 1/sqrt(2 pi m) (1 - 1/(12 m) + ...).
        var peak = (1 - (1 / (12 * Mean))) / Math.Sqrt(2 * Math.PI * Mean);
        Assert.InRange(Chains.Distance(window.Weight((long)Mean), peak), 0, 5e-16);
    }

    [Fact]
    public void Of_ANegativeOrHugeMean_IsRefused()
    {
        Assert.Throws<ArgumentOutOfRangeException>(() => PoissonWindow.Of(-1));
        Assert.Throws<ArgumentOutOfRangeException>(() => PoissonWindow.Of(1e11));
        Assert.Throws<ArgumentOutOfRangeException>(() => PoissonWindow.Of(1, 0));
    }
}
