using ChainSolve.Tests.Binding;
using ChainSolve.Tests.StateSpace;

namespace ChainSolve.Tests.Generators;

/// <summary>Whole warnings of explored chains.</summary>
public class ChainWarningTests
{
    [Theory]
    [InlineData("item u { a -> b at 1; b -> a at 1 }")]
    [InlineData("item u x 3 { a -> b at 1; b -> a at 1 }\ncounter n 0 .. 1\nevent e at 1 { n = 1 - n }")]
    public void Warnings_ChainWithoutOddities_None(string text) => Assert.Empty(Warnings(text));

    [Theory]
    [InlineData("item u { a -> b at 1 }", "1:6 S301 the state 'u: b' cannot be left")]
    [InlineData(
        "item u { a -> b at 1; b -> a at 1; a -> c at 1; c -> d at 1; d -> c at 1; a -> e at 1; e -> f at 1; f -> e at 1 }",
        "1:6 S302 the model ends in one of 2 sets of states that are never left again; long-run values weigh them by the chance of ending in each")]
    [InlineData("item u { a -> b at 1; b -> a at 1; c -> a at 1 }", "1:36 S303 move c -> a of u is never possible in a state that the model reaches")]
    [InlineData("counter n 0 .. 1\nevent e at 1 { n = 1 - n }\nevent f at 1 when n > 3 { n = 0 }", "3:1 S303 event f is never possible in a state that the model reaches")]
    public void Warnings_OddChain_SaySo(string text, string warning) => Assert.Equal([warning], Warnings(text));

    private static string[] Warnings(string text) => [.. ExploredText.Explore(text).Warnings.Select(Bound.Show)];
}
