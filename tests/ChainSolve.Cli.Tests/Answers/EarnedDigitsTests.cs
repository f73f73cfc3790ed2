using ChainSolve.Cli.Answers;

namespace ChainSolve.Cli.Tests.Answers;

public class EarnedDigitsTests
{
    [Theory]
    [InlineData(0.123456789, 1e-5, "0.1235")]
    [InlineData(0.123456789, 0.2, "0.1")]
    [InlineData(1234.5678, 0.004, "1234.57")]
    [InlineData(1.5e-12, 1e-25, "1.5e-12")]
    [InlineData(0.5, 0, "0.5")]
    [InlineData(0, 0, "0")]
    [InlineData(double.PositiveInfinity, 0, "Infinity")]
    public void Format_ValueAndBound_KeepsWhatIsSure(double value, double bound, string expected)
    {
        Assert.Equal(expected, EarnedDigits.Format(value, bound));
    }

    [Fact]
    public void Format_Limit_CutsTheDigits()
    {
        Assert.Equal("0.33333333", EarnedDigits.Format(1.0 / 3, 1e-17, 8));
    }
}
