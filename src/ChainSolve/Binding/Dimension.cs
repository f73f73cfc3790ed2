namespace ChainSolve.Binding;

/// <summary>What a number measures: a power of time. Only the written number 0 fits everywhere.</summary>
/// <param name="Power">0 for a plain number, 1 for a time, -1 for a rate.</param>
/// <param name="FitsAll">Whether it is the written 0, which has whatever dimension its place needs.</param>
internal readonly record struct Dimension(int Power, bool FitsAll = false)
{
    public static Dimension Plain => new(0);

    public static Dimension Time => new(1);

    public static Dimension Rate => new(-1);

    public static Dimension Any => new(0, true);

    public bool IsPlain => Power == 0 && !FitsAll;

    public bool Fits(Dimension other) => FitsAll || other.FitsAll || Power == other.Power;

    /// <summary>How messages call it, with its article.</summary>
    public string Describe() => Power switch
    {
        0 => "a plain number",
        1 => "a time",
        -1 => "a rate (1/time)",
        > 1 => $"a time^{Power}",
        _ => $"a 1/time^{-Power}",
    };
}
