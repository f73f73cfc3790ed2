using ChainSolve.Cli.Commands;

namespace ChainSolve.Cli.Tests.Commands;

public class TimeTextTests
{
    [Theory]
    [InlineData("10 h", 10, "h")]
    [InlineData("100h", 100, "h")]
    [InlineData(" 1.5 d ", 1.5, "d")]
    [InlineData("1e3 s", 1000, "s")]
    [InlineData("1_000 min", 1000, "min")]
    [InlineData("7", 7, "")]
    [InlineData("0", 0, "")]
    public void Parse_NumberAndUnit_AreRead(string text, double number, string unit)
    {
        Assert.Equal(new TimeText(number, unit), TimeText.Parse("--at", text));
    }

    [Theory]
    [InlineData("h", "is not a time")]
    [InlineData("", "is not a time")]
    [InlineData("1,5 h", "is not a time")]
    [InlineData("1e999 h", "is not a time")]
    [InlineData("NaN", "is not a")]
    [InlineData("-1 h", "is negative")]
    [InlineData("3 hours", "'hours' is not a unit of time; known: ms s min h d wk mo y")]
    public void Parse_Nonsense_SaysWhatIsWanted(string text, string message)
    {
        var exception = Assert.Throws<UsageException>(() => TimeText.Parse("--at", text));
        Assert.Contains(message, exception.Message, StringComparison.Ordinal);
    }

    [Theory]
    [InlineData("2 d", "h", 48)]
    [InlineData("1 y", "h", 8760)]
    [InlineData("1 y", "mo", 12)]
    [InlineData("36 s", "h", 0.01)]
    [InlineData("5 min", "min", 5)]
    [InlineData("0", "h", 0)]
    [InlineData("4", "", 4)]
    public void In_BaseUnit_Converts(string text, string unit, double expected)
    {
        Assert.Equal(expected, TimeText.Parse("--at", text).In("--at", unit), 1e-14);
    }

    [Fact]
    public void In_BareNumberForAModelWithUnits_AsksForTheUnit()
    {
        var exception = Assert.Throws<UsageException>(() => TimeText.Parse("--at", "12").In("--at", "h"));
        Assert.Equal("--at needs a unit, for example --at \"12 h\"", exception.Message);
    }

    [Fact]
    public void In_UnitForAModelWithoutUnits_AsksForABareNumber()
    {
        var exception = Assert.Throws<UsageException>(() => TimeText.Parse("--at", "12 h").In("--at", ""));
        Assert.Equal("the model has no units; write --at without 'h'", exception.Message);
    }
}
