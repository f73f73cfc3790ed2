using ChainSolve.Numerics.Iteration;
using ChainSolve.Numerics.Multilevel;
using ChainSolve.Numerics.Operators;
using ChainSolve.Numerics.Stationary;

namespace ChainSolve.Numerics.Balance;

/// <summary>Rounds of a Krylov method on the relative errors of the weights, each followed by two sweeps.</summary>
/// <remarks>
/// A round gains many digits in the sense of a norm; the rounds after it and the sweeps carry that to every single
/// weight. What a round still changes, how fast a disturbance fades, and how much the roundings of an imbalance are
/// magnified give the bound; it is estimated. Memory for the factors is as large as the chain.
/// </remarks>
/// <param name="name">The name of the method.</param>
/// <param name="solve">Solves a system for a right side up to a factor.</param>
internal sealed class BalanceSolver(string name, Func<FixedStateSystem, double[], double, double[]> solve) : IStationarySolver
{
    private const double Gain = 1e-8;

    // Equations that should hold with 1 on the right count as solved within this much.
    private const double Spared = 0.1;
    private const int MaxRounds = 12;
    private const int MaxProbes = 4;

    public string Name => name;

    public static BalanceSolver BiConjugate { get; } = new("bicgstab", BiConjugateGradients.Solve);

    public static BalanceSolver MinimalResidual { get; } = new("gmres", MinimalResiduals.Solve);

    public double Cost(Generator generator) => generator.StateCount == 1 ? 1 : 5000.0 * (generator.TransitionCount + generator.StateCount);

    public StationaryVector Solve(Generator generator, SolveContext context)
    {
        if (Normalised.Trivial(generator) is { } single)
        {
            return single;
        }

        var cancellation = context.Cancellation;
        cancellation.ThrowIfCancellationRequested();
        var finest = new FlowLevel(generator.Columns, generator.ExitRates, TreeGuess.Of(generator));
        finest.Sweep(false, cancellation);
        finest.Sweep(true, cancellation);
        var system = new FixedStateSystem(generator, finest.Weights, cancellation);
        var watch = new CycleWatch(generator, combines: false);
        while (!watch.IsDone && watch.Cycles < MaxRounds)
        {
            watch.Step(finest, Round);
            finest.Rescale();
            context.Progress?.Report(new SolveProgress(name, watch.Cycles, 0, $"error about {watch.Error:G2}"));
        }

        if (watch.IsDone)
        {
            watch.Probe(finest, () => Scatter(finest.Weights), Round, MaxProbes);
            watch.Amplification = Math.Max(1, Amplification(system));
        }

        if (!watch.IsDone || !(watch.Error <= 1e-3 * Math.Min(1, context.Tolerance * 1e6)))
        {
            throw new NotConvergedException(
                $"After {watch.Cycles} rounds of {name} over {generator.StateCount} states the weights change by {watch.Change:G2} in a round; " +
                $"of an error {watch.Contraction:G3} is left after one.");
        }

        return Normalised.Estimated(finest.Weights, watch.Error, $"{watch.Cycles} rounds of {name}, contraction {watch.Contraction:G3} a round");

        void Round()
        {
            var shares = solve(system, system.Imbalance(), Gain);
            for (var i = 0; i < shares.Length; i++)
            {
                // A weight has to stay positive; the sweeps see to those that would not.
                finest.Weights[i] *= double.IsFinite(shares[i]) ? Math.Max(1 + shares[i], 0.1) : 1;
            }

            finest.Sweep(false, cancellation);
            finest.Sweep(true, cancellation);
        }
    }

    /// <summary>
    /// How large an error the imbalances can make that are no larger than 1. The inverse has no negative entries, so ones
    /// everywhere show it. An imbalance is a small difference, known only to a rounding, so this times a
    /// rounding is as far as the rounds can come; infinite where these equations cannot be solved themselves.
    /// </summary>
    private double Amplification(FixedStateSystem system)
    {
        var ones = new double[system.Count];
        Array.Fill(ones, 1);
        var largest = solve(system, ones, Gain);
        var result = new double[system.Count];
        system.Multiply(largest, result);
        var (most, least) = (result.Max(), result.Min());
        return most < 1 + Spared && least > 1 - Spared ? 2 * largest.Max() : double.PositiveInfinity;
    }

    /// <summary>Disturbs weights one by one and in blocks of neighbours, by up to a quarter each.</summary>
    private static void Scatter(double[] weights)
    {
        for (var i = 0; i < weights.Length; i++)
        {
            for (var block = i; ; block >>= 3)
            {
                var mixed = ((uint)block + 99991u) * 2654435761u;
                mixed = (mixed ^ (mixed >> 15)) * 2246822519u;
                weights[i] *= 0.75 + ((mixed >> 8) / (double)(1 << 25));
                if (block == 0)
                {
                    break;
                }
            }
        }
    }
}
