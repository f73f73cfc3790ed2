using ChainSolve.Numerics.Arithmetic;
using ChainSolve.Numerics.Elimination;

namespace ChainSolve.Numerics.Absorption;

/// <summary>Answers a problem with all its right sides from one elimination.</summary>
internal static class EliminationAnswers
{
    private const double Rounding = 1.12e-16;

    public static AbsorptionResult Of(AbsorptionProblem problem, Func<AliveChain, IElimination> eliminate, string how)
    {
        var chain = AliveChain.Of(problem);
        var count = problem.Generator.StateCount;
        if (chain.Restriction.States.Length == 0)
        {
            return new AbsorptionResult
            {
                Sojourns = [.. problem.Starts.Select(_ => new double[count])],
                Earnings = [.. problem.Rewards.Select(_ => new double[count])],
                RelativeBound = 0,
                IsProved = true,
                How = "no state counts",
            };
        }

        var elimination = eliminate(chain);
        double[] Whole(WideNumber[] part) => chain.Restriction.Spread([.. part.Select(x => x.ToDouble())], count);
        return new AbsorptionResult
        {
            Sojourns = [.. problem.Starts.Select(s => Whole(elimination.Sojourns(chain.Restriction.Take(s))))],
            Earnings = [.. problem.Rewards.Select(r => Whole(elimination.Earnings(chain.Restriction.Take(r))))],
            RelativeBound = Rounding + elimination.RelativeBound,
            IsProved = true,
            How = how,
        };
    }
}
