using ChainSolve.Language.Syntax;

namespace ChainSolve.Binding;

/// <summary>Gives a syntax tree its meaning: names, types, dimensions, and the numbers of the time base.</summary>
internal static class Binder
{
    /// <summary>Binds a model.</summary>
    /// <param name="syntax">The tree.</param>
    /// <param name="hasTextFaults">
    /// Whether parts of the text could not be read and are missing from the tree: names that are not found are then no fault,
    /// since they may be declared there. The model is of no use in this case; the faults are.
    /// </param>
    public static BindResult Bind(ModelSyntax syntax, bool hasTextFaults = false) => new ModelBinding(syntax, hasTextFaults).Run();
}
