using ChainSolve.Expressions;
using ChainSolve.Language.Syntax;
using ChainSolve.Modelling;

namespace ChainSolve.Binding;

/// <summary>A name of the top level. Filled in while its statement is bound.</summary>
internal abstract class Symbol(Identifier name)
{
    public Identifier Name { get; } = name;

    /// <summary>What it is, with its article: <c>a given</c>.</summary>
    public abstract string Kind { get; }

    /// <summary>Whether anything refers to it.</summary>
    public bool IsUsed { get; set; }
}

internal sealed class GivenSymbol(GivenSyntax syntax, int index) : Symbol(syntax.Name)
{
    public GivenSyntax Syntax { get; } = syntax;

    public int Index { get; } = index;

    /// <summary>How expressions read it; null until it is bound, and where its own expression has a fault.</summary>
    public Quantity? Value { get; set; }

    public OutsideUnit? OutsideUnit { get; set; }

    public override string Kind => "a given";
}

internal sealed class LetSymbol(LetSyntax syntax) : Symbol(syntax.Name)
{
    public LetSyntax Syntax { get; } = syntax;

    public bool IsFunction => Syntax.Parameters is not null;

    /// <summary>The value; null for a function, and where its expression has a fault.</summary>
    public BoundValue? Value { get; set; }

    /// <summary>Whether it takes part in a cycle or leans on one; it has no value then.</summary>
    public bool IsCyclic { get; set; }

    public override string Kind => IsFunction ? "a function" : "a let";
}

internal sealed class CrewSymbol(CrewSyntax syntax) : Symbol(syntax.Name)
{
    public CrewSyntax Syntax { get; } = syntax;

    public Quantity? Count { get; set; }

    public override string Kind => "a crew";
}

internal sealed class CounterSymbol(CounterSyntax syntax) : Symbol(syntax.Name)
{
    public CounterSyntax Syntax { get; } = syntax;

    public VariableExpr? Variable { get; set; }

    public override string Kind => "a counter";
}

internal sealed class EventSymbol(EventSyntax syntax) : Symbol(syntax.Name)
{
    public EventSyntax Syntax { get; } = syntax;

    public Occurrence? Occurrence { get; set; }

    public override string Kind => "an event";
}

internal sealed class RewardSymbol(RewardSyntax syntax) : Symbol(syntax.Name)
{
    public RewardSyntax Syntax { get; } = syntax;

    public Earning? Earning { get; set; }

    public override string Kind => "a reward";
}

internal sealed class MeasureSymbol(MeasureSyntax syntax) : Symbol(syntax.Name)
{
    public MeasureSyntax Syntax { get; } = syntax;

    public override string Kind => "a measure";
}
