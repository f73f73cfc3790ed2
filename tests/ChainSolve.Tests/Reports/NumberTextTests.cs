using ChainSolve.Reports;

namespace ChainSolve.Tests.Reports;

/// <summary>How numbers are written.</summary>
public class NumberTextTests
{
    [Theory]
    [InlineData(0, 0, "0")]
    [InlineData(0, 1e-9, "0")]
    [InlineData(1, 0, "1")]
    [InlineData(0.5, 1e-17, "0.5")]
    [InlineData(1.0 / 3, 1e-16, "0.333333333333333")]
    [InlineData(1.0 / 3, 1e-4, "0.333")]
    [InlineData(1.0 / 3, 4e-4, "0.333")]
    [InlineData(1.0 / 3, 6e-4, "0.33")]
    [InlineData(1.0 / 3, 10, "0.3")]
    [InlineData(0.00018, 0, "0.00018")]
    [InlineData(0.000018, 0, "1.8e-5")]
    [InlineData(123456.7, 0.01, "123456.7")]
    [InlineData(123456.7, 20, "1.235e5")]
    [InlineData(-2.5e300, 1e290, "-2.5e300")]
    [InlineData(987654321.25, 1e-6, "987654321.25")]
    [InlineData(1e9, 0, "1e9")]
    [InlineData(5e-324, 5e-324, "5e-324")]
    [InlineData(double.PositiveInfinity, 0, "infinite")]
    [InlineData(double.NegativeInfinity, 0, "-infinite")]
    public void Earned_ValueAndBound_DigitsThatHold(double value, double bound, string expected) =>
        Assert.Equal(expected, NumberText.Earned(value, bound));

    [Theory]
    [InlineData(0, "0")]
    [InlineData(1.04e-16, "1.1e-16")]
    [InlineData(1e-16, "1e-16")]
    [InlineData(9.91e-3, "0.01")]
    [InlineData(0.0123, "0.013")]
    [InlineData(20, "20")]
    [InlineData(123, "1.3e2")]
    [InlineData(5e-324, "1e-300")]
    public void Bound_Value_RoundedUp(double bound, string expected) => Assert.Equal(expected, NumberText.Bound(bound));

    [Theory]
    [InlineData(1e-13, "1e-13")]
    [InlineData(1.0 / 3, "0.3333333333333333")]
    [InlineData(1e22, "1e22")]
    [InlineData(27886.0720567508, "27886.0720567508")]
    public void Full_Value_RoundTrips(double value, string expected)
    {
        Assert.Equal(expected, NumberText.Full(value));
        Assert.Equal(value, double.Parse(NumberText.Full(value), System.Globalization.CultureInfo.InvariantCulture));
    }

    [Fact]
    public void Align_Numbers_PointsStandUnderEachOther() =>
        Assert.Equal(["  0.25", "100   ", " -5e-7", "  3 h "], Columns.Align(["0.25", "100", "-5e-7", "3 h"]));
}
