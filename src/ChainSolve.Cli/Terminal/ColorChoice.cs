namespace ChainSolve.Cli.Terminal;

/// <summary>Decides whether the error stream gets colours.</summary>
internal static class ColorChoice
{
    /// <summary>Whether to use colours.</summary>
    /// <param name="when"><c>auto</c>, <c>always</c> or <c>never</c>.</param>
    /// <param name="streams">The streams; <c>auto</c> wants a terminal that can do it and no NO_COLOR (no-color.org).</param>
    public static bool Uses(string when, ProcessStreams streams) => when switch
    {
        "always" => true,
        "never" => false,
        _ => streams.ErrorIsTerminal && !streams.IsDumb && string.IsNullOrEmpty(streams.Environment("NO_COLOR")),
    };
}
