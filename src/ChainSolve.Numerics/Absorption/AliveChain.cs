using ChainSolve.Numerics.Arithmetic;
using ChainSolve.Numerics.Operators;

namespace ChainSolve.Numerics.Absorption;

/// <summary>The part of a chain that counts, and the rates by which it is left.</summary>
internal sealed class AliveChain
{
    private AliveChain(Restriction restriction, WideNumber[] toEnd)
    {
        Restriction = restriction;
        ToEnd = toEnd;
    }

    public Restriction Restriction { get; }

    /// <summary>The sum of the rates of each state that counts to states that do not.</summary>
    public WideNumber[] ToEnd { get; }

    public static AliveChain Of(AbsorptionProblem problem)
    {
        var states = Enumerable.Range(0, problem.Alive.Length).Where(i => problem.Alive[i]).ToArray();
        var rows = problem.Generator.Rows;
        var toEnd = new WideNumber[states.Length];
        for (var k = 0; k < states.Length; k++)
        {
            for (var e = rows.Offsets[states[k]]; e < rows.Offsets[states[k] + 1]; e++)
            {
                if (!problem.Alive[rows.Targets[e]])
                {
                    toEnd[k] += rows.Values[e];
                }
            }
        }

        return new AliveChain(states.Length == 0 ? new Restriction(problem.Generator, []) : Restriction.Of(problem.Generator, states), toEnd);
    }
}
