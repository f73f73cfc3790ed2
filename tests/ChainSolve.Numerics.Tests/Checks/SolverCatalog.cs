using ChainSolve.Numerics.Absorption;
using ChainSolve.Numerics.Stationary;
using ChainSolve.Numerics.Transient;

namespace ChainSolve.Numerics.Tests.Checks;

/// <summary>All solvers under test, by name.</summary>
internal static class SolverCatalog
{
    public static IReadOnlyList<ITransientSolver> Transient => TransientSolvers.All;

    public static IReadOnlyList<IStationarySolver> Stationary => StationarySolvers.All;

    public static IReadOnlyList<IAbsorptionSolver> Absorption => AbsorptionSolvers.All;
}
