using System.Globalization;
using ChainSolve.Binding;
using ChainSolve.Expressions;
using ChainSolve.Generators;
using ChainSolve.Modelling;
using ChainSolve.Numerics.Iteration;
using ChainSolve.Tests.Binding;

namespace ChainSolve.Tests.StateSpace;

/// <summary>Explores models from text and shows their chains.</summary>
internal static class ExploredText
{
    public static ExploredChain Explore(string text, ExprBackEnd backEnd = ExprBackEnd.Fastest)
    {
        var model = Bound.Model(text);
        return ChainBuilder.Build(model, Defaults(model), new ExploreOptions { BackEnd = backEnd }, SolveContext.Default);
    }

    public static GivenValues Defaults(BoundModel model) =>
        new GivenResolver(model).Defaults().Values ?? throw new InvalidOperationException("The givens have faults.");

    /// <summary>The transitions as <c>state -> state at rate</c>, in the order of states.</summary>
    public static string[] Transitions(string text)
    {
        var chain = Explore(text);
        return
        [
            .. Enumerable.Range(0, chain.States.Count).SelectMany(i => chain.Generator.TransitionsFrom(i).Select(
                t => string.Create(CultureInfo.InvariantCulture, $"{chain.Describe(i)} -> {chain.Describe(t.To)} at {t.Rate:R}"))),
        ];
    }

    /// <summary>The transitions are those of the list, in any order.</summary>
    public static void Has(string text, params string[] transitions) => Assert.Equal(transitions.Order(StringComparer.Ordinal), Transitions(text).Order(StringComparer.Ordinal));

    /// <summary>The start as <c>state: chance</c>.</summary>
    public static string[] Start(string text)
    {
        var chain = Explore(text);
        return
        [
            .. Enumerable.Range(0, chain.States.Count).Where(i => chain.Start[i] > 0).Select(
                i => string.Create(CultureInfo.InvariantCulture, $"{chain.Describe(i)} ({chain.Start[i]:R})")).Order(StringComparer.Ordinal),
        ];
    }
}
