namespace ChainSolve.Measures;

/// <summary>The codes of faults (N1xx) and warnings (N2xx) of the calculation. A code is never used again for something else.</summary>
internal static class NumericCodes
{
    public const string Share = "N101";
    public const string NoMeasures = "N102";
    public const string SeveralClasses = "N201";

    /// <summary>Every code with the title of its page.</summary>
    public static IReadOnlyList<(string Code, string Title)> All { get; } =
    [
        (Share, "a quantile of a share that is not between 0 and 1"),
        (NoMeasures, "a model that asks for nothing"),
        (SeveralClasses, "steady values of a model that can end in several ways"),
    ];
}
