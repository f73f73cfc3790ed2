using ChainSolve.Tests.Shared.Reference;

namespace ChainSolve.Numerics.Tests.Reference;

public class BigFloatTests
{
    [Theory]
    [InlineData("0.1")]
    [InlineData("1e-300")]
    [InlineData("-2.5e17")]
    [InlineData("5e-324")]
    [InlineData("123456789.125")]
    public void Parse_ADecimal_IsTheNearestDouble(string text) =>
        Assert.Equal(double.Parse(text, System.Globalization.CultureInfo.InvariantCulture), BigFloat.Parse(text).ToDouble());

    [Fact]
    public void ExpOfSmall_OfOne_HasTheDigitsOfE()
    {
        // Digits of e from memory; any table of constants has them.
        var expected = BigFloat.Parse("2.7182818284590452353602874713526624977572470937");

        Assert.True((BigFloat.ExpOfSmall(1.0) - expected).Abs < 1e-45);
    }

    [Fact]
    public void Arithmetic_OfAThird_ComesBack()
    {
        var third = BigFloat.One / 3.0;

        Assert.True(((third * 3.0) - BigFloat.One).Abs < 1e-75);
        Assert.True((third - (1.0 / 3)).Abs < 1e-16);
        Assert.True(third > 0.3333);
    }
}
