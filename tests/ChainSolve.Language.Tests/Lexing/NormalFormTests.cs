using ChainSolve.Language.Lexing;

namespace ChainSolve.Language.Tests.Lexing;

public class NormalFormTests
{
    /// <summary>Expected forms from the module unicodedata of Python 3, Unicode 14.0.0.</summary>
    [Theory]
    [InlineData("\u0063\u0061\u0066\u0065\u0301", "\u0063\u0061\u0066\u00E9")]
    [InlineData("\u2126", "\u03A9")]
    [InlineData("\u212B", "\u00C5")]
    [InlineData("\u0061\u0308\u0304", "\u01DF")]
    [InlineData("\u0061\u0304\u0308", "\u0101\u0308")]
    [InlineData("\u0071\u0307\u0323", "\u0071\u0323\u0307")]
    [InlineData("\u0073\u0323\u0307", "\u1E69")]
    [InlineData("\u1E0B\u0323", "\u1E0D\u0307")]
    [InlineData("\u0915\u093C", "\u0915\u093C")]
    [InlineData("\u1100\u1161\u11A8", "\uAC01")]
    [InlineData("\uAC00\u11A8", "\uAC01")]
    [InlineData("\u1112\u1161\u11AB\u1100\u1173\u11AF", "\uD55C\uAE00")]
    [InlineData("\u03B1\u0301", "\u03AC")]
    [InlineData("\u03C9\u0314\u0301\u0345", "\u1FA5")]
    [InlineData("\u0B47\u0B3E", "\u0B4B")]
    [InlineData("\u0061\u0301\u0301", "\u00E1\u0301")]
    [InlineData("\uFB1D", "\u05D9\u05B4")]
    [InlineData("\u05D9\u05B4", "\u05D9\u05B4")]
    [InlineData("\U0001D15E", "\U0001D157\U0001D165")]
    [InlineData("\u00E9\u0323", "\u1EB9\u0301")]
    [InlineData("\u1FEF", "\u0060")]
    [InlineData("\u0065\u0327\u0301", "\u0229\u0301")]
    [InlineData("\u0344", "\u0308\u0301")]
    [InlineData("\u006C\u0307\u0331", "\u1E3B\u0307")]
    [InlineData("\u0391\u0331\u0307\u0345", "\u1FBC\u0331\u0307")]
    [InlineData("\u03C9\u030A", "\u03C9\u030A")]
    [InlineData("\u0075\u0302", "\u00FB")]
    [InlineData("\u0065\u030A\u0303\u0308", "\u0065\u030A\u0303\u0308")]
    [InlineData("\u03C9\u0327", "\u03C9\u0327")]
    [InlineData("\u0075\u0331", "\u0075\u0331")]
    [InlineData("\u0075\u0304\u0302\u0345\u0308", "\u016B\u0302\u0308\u0345")]
    [InlineData("\u006F\u0302", "\u00F4")]
    [InlineData("\u0391\u0302\u0302\u0300\u0300", "\u0391\u0302\u0302\u0300\u0300")]
    [InlineData("\u0075\u0302\u0302", "\u00FB\u0302")]
    [InlineData("\u0063\u0303\u0323\u0328", "\u0063\u0328\u0323\u0303")]
    [InlineData("\u0075\u0331\u0303", "\u0169\u0331")]
    [InlineData("\u006E\u0300\u0307\u0308", "\u01F9\u0307\u0308")]
    [InlineData("\u006F\u0304\u0301", "\u1E53")]
    [InlineData("\u0073\u0327\u0327\u0300", "\u015F\u0327\u0300")]
    [InlineData("\u0391\u0301\u0304\u0307", "\u0386\u0304\u0307")]
    public void Of_Text_IsNormalFormC(string text, string expected)
    {
        Assert.Equal(expected, NormalForm.Of(text));
        Assert.Equal(expected, NormalForm.Of(expected));
    }

    [Fact]
    public void Of_TextWithoutMarks_IsTheSameText() => Assert.Same("pump_é1", NormalForm.Of("pump_é1"));
}
