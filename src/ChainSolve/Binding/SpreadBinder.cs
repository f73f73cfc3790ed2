using ChainSolve.Expressions;
using ChainSolve.Language.Syntax;
using ChainSolve.Modelling;

namespace ChainSolve.Binding;

/// <summary>Binds the distributions behind <c>spread</c>.</summary>
internal sealed class SpreadBinder(BindContext context, ExpressionBinder expressions)
{
    private static readonly (string Name, SpreadKind Kind, string[] Parameters)[] Laws =
    [
        ("uniform", SpreadKind.Uniform, ["lo", "hi"]),
        ("lognormal", SpreadKind.Lognormal, ["median", "ef"]),
        ("gamma", SpreadKind.Gamma, ["shape", "scale"]),
        ("beta", SpreadKind.Beta, ["a", "b"]),
        ("triangular", SpreadKind.Triangular, ["lo", "mode", "hi"]),
    ];

    // These are plain numbers whatever the given is.
    private static readonly string[] PlainParameters = ["ef", "shape", "a", "b"];

    /// <summary>The distribution; null after a fault.</summary>
    public BoundSpread? Bind(CallSyntax syntax, Dimension dimension, ExprScope scope)
    {
        var law = Array.Find(Laws, l => l.Name == syntax.Function.Text);
        if (law.Name is null)
        {
            context.Report(BindingFaults.UnknownLaw(syntax.Function, Laws.Select(l => $"{l.Name}({string.Join(", ", l.Parameters)})"), Laws.Select(l => l.Name)));
            return null;
        }

        if (syntax.Arguments.Count != law.Parameters.Length)
        {
            context.Report(BindingFaults.ArgumentCount(
                syntax.Function, FormattableString.Invariant($"{law.Parameters.Length} arguments ({string.Join(", ", law.Parameters)})"), syntax.Arguments.Count));
            return null;
        }

        if (law.Kind == SpreadKind.Beta && dimension.Power != 0)
        {
            context.Report(BindingFaults.BetaNeedsPlain(syntax.Function, dimension));
            return null;
        }

        var parameters = new List<NumberExpr>();
        foreach (var (argument, parameter) in syntax.Arguments.Zip(law.Parameters))
        {
            var needed = PlainParameters.Contains(parameter, StringComparer.Ordinal) ? Dimension.Plain : dimension;
            if (expressions.BindQuantity(argument, scope, needed, $"'{parameter}' of '{law.Name}'") is { } value)
            {
                parameters.Add(value.Expr);
            }
        }

        return parameters.Count < law.Parameters.Length ? null : new BoundSpread(law.Kind, parameters);
    }
}
