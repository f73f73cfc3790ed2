namespace ChainSolve.Tests.Shared.Checks;

/// <summary>A chain in a file of checks: states and moves, or a family with its numbers.</summary>
internal sealed record CheckChain
{
    public string[]? States { get; init; }

    public CheckMove[]? Moves { get; init; }

    /// <summary>The start by state name; null for the first state, which an irreducible chain forgets.</summary>
    public Dictionary<string, double>? Start { get; init; }

    public string? Family { get; init; }

    public int Levels { get; init; }

    public double Birth { get; init; }

    public double Death { get; init; }

    public double[]? Births { get; init; }

    public double[]? Deaths { get; init; }

    public int Servers { get; init; }

    public double Traffic { get; init; }

    public int Units { get; init; }

    public int Crews { get; init; }

    public double Failure { get; init; }

    public double Repair { get; init; }

    public double Rate { get; init; }

    public double[]? Failures { get; init; }

    public double[]? Repairs { get; init; }

    public double[]? Mu { get; init; }

    public double[][]? Routing { get; init; }

    public int Customers { get; init; }

    public double Arrival { get; init; }

    public double StageRate { get; init; }
}
