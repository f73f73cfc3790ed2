using ChainSolve.Numerics.Absorption;
using ChainSolve.Numerics.Krylov;
using ChainSolve.Numerics.Stationary;
using ChainSolve.Numerics.Transient;

namespace ChainSolve.Numerics.Tests.Checks;

/// <summary>All solvers under test, by name.</summary>
internal static class SolverCatalog
{
    /// <summary>Those that are right digit by digit; subspaces are not, and have tests of their own.</summary>
    public static IReadOnlyList<ITransientSolver> Transient => [.. TransientSolvers.All.Where(s => s is not KrylovSolver)];

    public static IReadOnlyList<IStationarySolver> Stationary => StationarySolvers.All;

    public static IReadOnlyList<IAbsorptionSolver> Absorption => AbsorptionSolvers.All;
}
