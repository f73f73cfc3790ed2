namespace ChainSolve.Language.Diagnostics;

/// <summary>How grave a <see cref="Diagnostic"/> is.</summary>
public enum Severity
{
    /// <summary>The model is used as it stands; the reader should know of it.</summary>
    Warning,

    /// <summary>The model cannot be used.</summary>
    Fault,
}
