using ChainSolve.Language.Diagnostics;

namespace ChainSolve.Measures;

/// <summary>The codes of faults (N1xx) and warnings (N2xx) of the calculation. A code is never used again for something else.</summary>
internal static class NumericCodes
{
    public static readonly DiagnosticCode NoMeasures = new("N102", "a model that asks for nothing");

    public static readonly DiagnosticCode SeveralClasses = new("N201", "steady values of a model that can end in several ways");

    /// <summary>Every code, in order.</summary>
    public static IReadOnlyList<DiagnosticCode> All { get; } = [NoMeasures, SeveralClasses];
}
