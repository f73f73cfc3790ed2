using ChainSolve.Expressions;
using ChainSolve.Generators;

namespace ChainSolve.Measures;

/// <summary>The conditions and rewards of measures as vectors over the states of a chain. Not safe to share between threads.</summary>
internal sealed class StateVectors(Chain chain, CancellationToken cancellation)
{
    private readonly VectorPool pool = new();
    private readonly Dictionary<ConditionExpr, bool[]> conditions = new(ReferenceEqualityComparer.Instance);
    private readonly Dictionary<bool[], double[]> entering = new(ReferenceEqualityComparer.Instance);

    /// <summary>True where a condition holds.</summary>
    public bool[] Holds(ConditionExpr condition)
    {
        if (!conditions.TryGetValue(condition, out var mask))
        {
            conditions[condition] = mask = pool.Intern(chain.Evaluate(condition, cancellation));
        }

        return mask;
    }

    public bool[] Not(bool[] mask) => pool.Intern(Array.ConvertAll(mask, m => !m));

    /// <summary>1 in the states of a set, 0 elsewhere.</summary>
    public double[] Ones(bool[] mask) => pool.Intern(Array.ConvertAll(mask, m => m ? 1.0 : 0.0));

    /// <summary>By state outside of a set: the rate at which the set is entered, right to one rounding.</summary>
    public double[] Entering(bool[] mask)
    {
        if (!entering.TryGetValue(mask, out var rates))
        {
            entering[mask] = rates = pool.Intern(chain.Generator.RatesInto(mask));
        }

        return rates;
    }

    /// <summary>A reward as what is gained and what is lost, neither negative; the loss is null where there is none.</summary>
    public (double[] Gain, double[]? Loss) Split(NumberExpr reward)
    {
        var values = chain.Evaluate(reward, cancellation);
        return Array.Exists(values, v => v < 0)
            ? (pool.Intern(Array.ConvertAll(values, v => v > 0 ? v : 0)), pool.Intern(Array.ConvertAll(values, v => v < 0 ? -v : 0)))
            : (pool.Intern(Array.ConvertAll(values, v => v == 0 ? 0 : v)), null);
    }
}
