using ChainSolve.Numerics.Iteration;
using ChainSolve.Numerics.Operators;

namespace ChainSolve.Numerics.Stationary;

/// <summary>Steers sweeps and judges how far they have come. Not safe to share between threads.</summary>
internal sealed class ConvergenceWatch
{
    private const double Spent = 1e-14;

    // Above it the spread tells the speed, below it rounding takes part.
    private const double Rough = 1e-12;
    private const double Unit = 1.12e-16;

    // Errors of over-relaxed sweeps turn as they shrink: for so many batches they may seem to stand still.
    private const int TurningSteps = 8;

    // Batches until the speed of a relaxation shows.
    private const int TrialSteps = 4;
    private const double RelaxationStep = 0.1;
    private const double MaxRelaxation = 1.85;

    private readonly StationarySweeps sweeps;
    private readonly bool overRelaxes;
    private readonly int batch;
    private readonly double sweepRounding;
    private double relaxation = 1;
    private double spread;
    private double lowestSpread = double.PositiveInfinity;
    private int spreadStandstill;
    private double change = double.PositiveInfinity;
    private double bestContraction = double.PositiveInfinity;
    private double bestRelaxation = 1;
    private bool isSettled;
    private bool isSpent;
    private double lastContraction = 1;
    private double contractionBeforeLast = 1;
    private double spreadAtSettling;
    private int stepsAtSettling;
    private int standstill;
    private int steps;

    public ConvergenceWatch(StationarySweeps sweeps, Generator generator, bool overRelaxes, int batch)
    {
        (this.sweeps, this.overRelaxes, this.batch) = (sweeps, overRelaxes, batch);
        spread = spreadAtSettling = sweeps.Spread();
        sweepRounding = Unit * (3 + (generator.TransitionCount / (double)generator.StateCount / 2));
    }

    /// <summary>How much of an error is left after one cycle: the worst of what was seen lately.</summary>
    public double Contraction { get; private set; } = 1;

    /// <summary>The error that is left, relative, for the worst probability.</summary>
    public double Error => Contraction >= 1
        ? double.PositiveInfinity
        : (overRelaxes ? 1024 : 8) * (((change * Contraction) + sweepRounding) / (1 - Contraction) + spread);

    public bool IsDone { get; private set; }

    /// <summary>The cycles that are still needed at the speed seen last; 0 while it is not known.</summary>
    public double CyclesToGo => steps < stepsAtSettling + 16 || isSpent || spread <= Rough || (overRelaxes && !isSettled) ? 0
        : Contraction >= 1 ? double.PositiveInfinity
        : Math.Log(spread / Spent) / -Math.Log(Contraction);

    public string Note => overRelaxes ? $", relaxation {relaxation:G4}" : "";

    public void Step(SolveContext context)
    {
        steps++;
        var cancellation = context.Cancellation;
        var alternates = !overRelaxes;
        if (!isSpent)
        {
            // The two vectors do not touch each other, so the digits do not depend on the number of threads.
            if (context.Threads > 1)
            {
                Parallel.Invoke(
                    new ParallelOptions { CancellationToken = cancellation },
                    () => sweeps.Advance(batch, relaxation, alternates, cancellation),
                    () => sweeps.AdvanceAdjoint(batch, relaxation, alternates, cancellation));
            }
            else
            {
                sweeps.Advance(batch, relaxation, alternates, cancellation);
                sweeps.AdvanceAdjoint(batch, relaxation, alternates, cancellation);
            }

            var next = sweeps.Spread();
            if (next > Rough || steps == 1)
            {
                var seen = Math.Pow(Math.Max(next, Spent) / spread, 1.0 / batch);
                var overall = Math.Pow(next / spreadAtSettling, 1.0 / batch / Math.Max(1, steps - stepsAtSettling));
                Contraction = steps == 1 ? seen : Math.Max(Math.Max(seen, overall), Math.Max(lastContraction, contractionBeforeLast));
                (contractionBeforeLast, lastContraction) = (steps == 1 ? seen : lastContraction, seen);
            }

            // Close to its own rounding the spread stands still; what it has reached counts towards the error.
            spreadStandstill = next > 0.97 * lowestSpread ? spreadStandstill + 1 : 0;
            lowestSpread = Math.Min(lowestSpread, next);
            isSpent = next <= Spent || (next < Rough && spreadStandstill >= (overRelaxes ? TurningSteps : 1));
            spread = next;
            Relax();
        }
        else
        {
            sweeps.Advance(batch, relaxation, alternates, cancellation);
        }

        sweeps.Rescale();
        var before = change;
        change = sweeps.LargestChange();

        // It stands still where it gains less than half of what the contraction promises.
        standstill = change > before * (1 + Math.Pow(Contraction, batch)) / 2 ? standstill + 1 : 0;
        IsDone = isSpent && Contraction < 1
            && (change * Contraction <= sweepRounding / 4 || (standstill >= (overRelaxes ? TurningSteps : 3) && change < 1e-12));
    }

    /// <summary>Raises the relaxation step by step as long as that speeds up, and steps back when it no longer does.</summary>
    private void Relax()
    {
        if (!overRelaxes)
        {
            return;
        }

        if (relaxation > 1 && !(lastContraction < 1))
        {
            // The errors grew. What the weights are now is a new beginning, and the adjoint vector begins anew with them.
            Settle(isSettled ? 1 + ((relaxation - 1) / 2) : bestRelaxation);
            sweeps.RestartAdjoint();
            spread = spreadAtSettling = lowestSpread = sweeps.Spread();
            (isSpent, spreadStandstill) = (false, 0);
            return;
        }

        if (isSettled || steps % TrialSteps != 0)
        {
            return;
        }

        if (lastContraction < bestContraction)
        {
            (bestContraction, bestRelaxation) = (lastContraction, relaxation);
            if (relaxation < MaxRelaxation)
            {
                relaxation += RelaxationStep;
                return;
            }
        }

        Settle(bestRelaxation);
    }

    private void Settle(double chosen)
    {
        relaxation = chosen < 1 + (RelaxationStep / 2) ? 1 : chosen;
        isSettled = true;
        (spreadAtSettling, stepsAtSettling) = (spread, steps);
    }
}
