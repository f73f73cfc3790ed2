using ChainSolve.Language.Text;
using ChainSolve.Modelling;

namespace ChainSolve.Binding;

/// <summary>Which parameters the distributions can have.</summary>
internal static class SpreadRules
{
    /// <summary>What is wrong with the parameters; null where nothing is.</summary>
    public static Fault? Check(BoundSpread spread, TextSpan span, double[] givens)
    {
        var p = spread.Parameters.Select(parameter => GivenEvaluator.ValueOf(parameter, givens)).ToArray();
        var (law, rule, holds) = spread.Kind switch
        {
            SpreadKind.Uniform => ("uniform", "lo < hi", p[0] < p[1]),
            SpreadKind.Lognormal => ("lognormal", "a median above 0 and an error factor above 1", p[0] > 0 && p[1] > 1),
            SpreadKind.Gamma => ("gamma", "shape and scale above 0", p[0] > 0 && p[1] > 0),
            SpreadKind.Beta => ("beta", "a and b above 0", p[0] > 0 && p[1] > 0),
            _ => ("triangular", "lo <= mode <= hi and lo < hi", p[0] <= p[1] && p[1] <= p[2] && p[0] < p[2]),
        };
        return holds && Array.TrueForAll(p, double.IsFinite) ? null : BindingFaults.LawParameters(span, law, rule);
    }
}
