using ChainSolve.Language.Diagnostics;

namespace ChainSolve.Language.Tests.Diagnostics;

public class SuggestionsTests
{
    private static readonly string[] Known = ["check", "solve", "starter"];

    [Theory]
    [InlineData("slove", "solve")]
    [InlineData("sovle", "solve")]
    [InlineData("chek", "check")]
    [InlineData("checkk", "check")]
    [InlineData("startar", "starter")]
    public void Nearest_Misspelt_FindsTheWord(string word, string expected)
    {
        Assert.Equal(expected, Suggestions.Nearest(word, Known));
    }

    [Theory]
    [InlineData("report")]
    [InlineData("x")]
    public void Nearest_FarFromAll_IsNull(string word)
    {
        Assert.Null(Suggestions.Nearest(word, Known));
    }

    [Fact]
    public void Nearest_NothingKnown_IsNull()
    {
        Assert.Null(Suggestions.Nearest("solve", []));
    }
}
