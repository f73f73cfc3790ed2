using System.Globalization;
using ChainSolve.Tests.Binding;
using ChainSolve.Tests.StateSpace;

namespace ChainSolve.Tests.Generators;

/// <summary>Numbers of states and moves that are known in closed form, and numberings that do not follow the way of writing.</summary>
public class ChainSizeTests
{
    [Theory]
    [InlineData(1)]
    [InlineData(4)]
    [InlineData(12)]
    public void Product_OfLoneTwoStateItems_IsTheCube(int items)
    {
        var text = string.Concat(Enumerable.Range(0, items).Select(i => string.Create(CultureInfo.InvariantCulture, $"item u{i} {{ a -> b at {i + 1} ; b -> a at 1 }}\n")));
        var found = Model.Parse(text).Explore();
        Assert.Equal((1 << items, (long)items << items), (found.StateCount, found.TransitionCount));
        Assert.Equal(items * (items + 1) / 2.0, found.LargestExitRate, 1e-12 * items * items);
    }

    [Theory]
    [InlineData(5, 4, 56, 210)]
    [InlineData(20, 3, 231, 840)]
    public void Product_OfReplicasOnALine_IsTheBinomialNumber(int replicas, int states, int count, long moves)
    {
        // States: the ways to share N replicas among S places, C(N + S - 1, S - 1). Moves: each of the 2 (S - 1) arrows needs one replica in its source, C(N + S - 2, S - 1) states.
        var arrows = string.Join(" ; ", Enumerable.Range(0, states - 1).Select(s => $"s{s} -> s{s + 1} at 1 ; s{s + 1} -> s{s} at 1"));
        var found = Model.Parse($"item u x {replicas} {{ states {string.Join(", ", Enumerable.Range(0, states).Select(s => $"s{s}"))}\n{arrows} }}").Explore();
        Assert.Equal((count, moves), (found.StateCount, found.TransitionCount));
    }

    [Fact]
    public void Product_OfReplicasAndCounter_Multiplies()
    {
        var found = Model.Parse("item u x 9 { a -> b at 1 ; b -> a at 1 }\ncounter n 0 .. 6\nevent up at 1 when n < 6 { n = n + 1 }\nevent down at 1 when n > 0 { n = n - 1 }").Explore();
        Assert.Equal((10 * 7, (18L * 7) + (12 * 10)), (found.StateCount, found.TransitionCount));
    }

    [Fact]
    public void Numbering_EventsAndMovesInAnotherOrder_IsTheSame()
    {
        const string item = "item u x 3 {{ states a, b, c\n{0} ; {1} ; {2} }}\n";
        string[] moves = ["a -> b at 1", "b -> c at 0.1", "c -> a at 3"];
        string[] rest = ["counter n 0 .. 2\n", "event up at 1 when n < 2 { n = n + 1 }\n", "event down at 0.7 when n > 0 { n = n - 1 }\n"];
        var one = ExploredText.Explore(string.Format(CultureInfo.InvariantCulture, item, moves) + string.Concat(rest));
        var other = ExploredText.Explore(string.Concat(rest.Reverse()) + string.Format(CultureInfo.InvariantCulture, item, [.. moves.Reverse()]));
        Assert.Equal(30, one.States.Count);
        for (var state = 0; state < one.States.Count; state++)
        {
            Assert.Equal(one.Describe(state), other.Describe(state));
            Assert.Equal(one.Generator.TransitionsFrom(state), other.Generator.TransitionsFrom(state));
        }
    }

    [Theory]
    [InlineData("item u x 2 { a -> b at 1 ; a -> c at 1 }",
        "1:6 S301 3 states cannot be left, 'u: c 2' the first of them",
        "1:6 S302 the model ends in one of 3 sets of states that are never left again; long-run values weigh them by the chance of ending in each")]
    [InlineData("item pump { up -> down at 1 ; down -> up at 1 }\nitem u { a -> b at 1 ; c -> a at 1 }\nevent e at 0 { }",
        "2:24 S303 move c -> a of u is never possible in a state that the model reaches",
        "3:1 S303 event e is never possible in a state that the model reaches")]
    [InlineData("counter n 0 .. 3\nevent up at 1 when n < 3 { n = n + 1 }", "1:9 S301 the state 'n = 3' cannot be left")]
    [InlineData("item u { start a 0.5, b 0.5\na -> c at 1 ; c -> a at 1 ; b -> d at 1 ; d -> b at 1 }",
        "1:6 S302 the model ends in one of 2 sets of states that are never left again; long-run values weigh them by the chance of ending in each")]
    [InlineData("counter n 0 .. 3\nevent spin at 1 { }")]
    public void Warnings_OfStates_InTheOrderOfTheText(string text, params string[] warnings) =>
        Assert.Equal(warnings, ExploredText.Explore(text).Warnings.Select(Bound.Show));

    [Fact]
    public void Warnings_OfARefilledChain_AreThoseOfItsRates()
    {
        var model = Model.Parse("given l = 1\nitem u { a -> b at 1 ; b -> a at 1 ; a -> b at l }");
        Assert.Empty(model.Explore().Warnings);
        Assert.Equal(
            ["2:38 S303 move a -> b of u is never possible in a state that the model reaches"],
            model.With("l", 0).Explore().Warnings.Select(Bound.Show));
    }
}
