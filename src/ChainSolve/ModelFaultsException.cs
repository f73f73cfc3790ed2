using ChainSolve.Language.Diagnostics;

namespace ChainSolve;

/// <summary>A model has faults and cannot be used.</summary>
public sealed class ModelFaultsException : Exception
{
    /// <summary>Creates the exception.</summary>
    /// <param name="faults">The faults and warnings, in the order of the text; at least one fault.</param>
    public ModelFaultsException(IReadOnlyList<Diagnostic> faults)
        : base(Summarise(faults))
    {
        Faults = faults;
    }

    /// <summary>The faults and warnings, in the order of the text.</summary>
    public IReadOnlyList<Diagnostic> Faults { get; }

    private static string Summarise(IReadOnlyList<Diagnostic> faults)
    {
        ArgumentNullException.ThrowIfNull(faults);
        return string.Join(Environment.NewLine, faults.Select(f => $"{f.Source.Name}:{f.Position.Line}:{f.Position.Column}  {f.Code}  {f.Message}"));
    }
}
