using ChainSolve.Language.Syntax;

namespace ChainSolve.Binding;

/// <summary>Gives a syntax tree its meaning: names, types, dimensions, and the numbers of the time base.</summary>
internal static class Binder
{
    /// <summary>Binds a model.</summary>
    /// <param name="syntax">The tree.</param>
    /// <remarks>
    /// Where parts of the text could not be read, names that are not found and stand there are no fault, since they may be declared there.
    /// The model is of no use in this case; the faults are.
    /// </remarks>
    public static BindResult Bind(ModelSyntax syntax) => new ModelBinding(syntax).Run();
}
