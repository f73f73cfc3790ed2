using ChainSolve.Expressions;
using ChainSolve.Language.Syntax;
using ChainSolve.Modelling;

namespace ChainSolve.Binding;

/// <summary>A move whose parts are bound and whose share of a crew is still open.</summary>
internal sealed record MoveDraft
{
    public required ItemSymbol Item { get; init; }

    public required MoveSyntax Syntax { get; init; }

    /// <summary>How messages call it: <c>move up -> down of pump</c>.</summary>
    public required string Label { get; init; }

    /// <summary>Index of the state that is left.</summary>
    public required int From { get; init; }

    /// <summary>The rate of one replica.</summary>
    public required Quantity Rate { get; init; }

    public required Truth? When { get; init; }

    public required CrewSymbol? Crew { get; init; }

    /// <summary>The rank in a ranked crew; 0 elsewhere.</summary>
    public required double Rank { get; init; }

    public required IReadOnlyList<BoundEffect> Effects { get; init; }

    /// <summary>How many replicas are in the state that is left.</summary>
    public VariableExpr Source => Item.Places[From];
}

/// <summary>When and how fast something happens: what a reward for each occurrence builds on.</summary>
internal sealed record Occurrence(ConditionExpr? Guard, NumberExpr Rate);
