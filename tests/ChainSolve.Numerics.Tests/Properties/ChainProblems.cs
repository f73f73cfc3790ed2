using ChainSolve.Numerics.Operators;
using ChainSolve.Numerics.Transient;
using ChainSolve.Tests.Shared.Chains;

namespace ChainSolve.Numerics.Tests.Properties;

/// <summary>Turns random chains into what the solvers take.</summary>
internal static class ChainProblems
{
    public static Generator Generator(this RandomChain chain) => Build(chain.Count, chain.Moves);

    public static Generator Build(int count, IEnumerable<(int From, int To, double Rate)> moves)
    {
        var builder = new GeneratorBuilder(count);
        foreach (var (from, to, rate) in moves)
        {
            builder.Add(from, to, rate);
        }

        return builder.Build();
    }

    /// <summary>The distribution, the mean reward and its total at some times.</summary>
    public static TransientProblem Problem(this RandomChain chain, params double[] times) => new()
    {
        Generator = chain.Generator(),
        Start = chain.Start,
        Times = times,
        Rates = [chain.Rewards],
        Totals = [chain.Rewards],
        WantsDistributions = true,
    };

    public static double[] Unit(int count, int at) => [.. Enumerable.Range(0, count).Select(i => i == at ? 1.0 : 0)];
}
