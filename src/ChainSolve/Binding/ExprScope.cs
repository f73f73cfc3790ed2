namespace ChainSolve.Binding;

/// <summary>What an expression may refer to at the place where it stands.</summary>
internal sealed record ExprScope
{
    /// <summary>Everything of the top level, and nothing more.</summary>
    public static ExprScope Top { get; } = new();

    /// <summary>Local names or parameters, which hide those of the top level; null values had a fault.</summary>
    public IReadOnlyDictionary<string, BoundValue?>? Locals { get; init; }

    /// <summary>The local names that were used, where anyone wants to know.</summary>
    public ISet<string>? UsedLocals { get; init; }

    /// <summary>Set where the state may not be read; how messages call the place: <c>the count of item 'pump'</c>.</summary>
    public string? FixedPlace { get; init; }

    /// <summary>Set in the statement of a given: only givens with a lower index are in reach.</summary>
    public int? GivensBelow { get; init; }

    /// <summary>Names of another kind that may have been meant where a lone name is not known.</summary>
    public IEnumerable<string> AlsoMeant { get; init; } = [];

    /// <summary>Set for texts from outside the model: no name is in reach.</summary>
    public bool NoNames { get; init; }

    public static ExprScope Fixed(string place) => new() { FixedPlace = place };

    public ExprScope AsFixed(string place) => this with { FixedPlace = place };
}
