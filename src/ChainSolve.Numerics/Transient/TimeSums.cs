using ChainSolve.Numerics.Arithmetic;
using ChainSolve.Numerics.Poisson;

namespace ChainSolve.Numerics.Transient;

/// <summary>
/// What one time gathers from the vectors of a uniformized chain as they go by: the Poisson-weighted sums of what they earn,
/// of the tails, and of the vectors themselves.
/// </summary>
internal sealed class TimeSums
{
    // What the steps still to come may add, relative to what is there; far below a rounding.
    private const double Settled = 1e-18;

    private readonly PoissonWindow window;
    private readonly UniformizedStep step;
    private readonly LongSum[] rates;
    private readonly LongSum[] totals;
    private readonly bool[]? reached;
    private readonly double[]? low;
    private readonly double startMass;

    /// <summary>Prepares the sums of one time.</summary>
    /// <param name="window">The weights of the time.</param>
    /// <param name="step">The vectors; its rewards are first the rates, then the totals.</param>
    /// <param name="rateCount">How many of the rewards are rates.</param>
    /// <param name="totalCount">How many are totals.</param>
    /// <param name="reached">The states whose probabilities are wanted; null for none.</param>
    public TimeSums(PoissonWindow window, UniformizedStep step, int rateCount, int totalCount, bool[]? reached)
    {
        this.window = window;
        this.step = step;
        this.reached = reached;
        rates = new LongSum[rateCount];
        totals = new LongSum[totalCount];
        startMass = step.Mass;
        if (reached is not null)
        {
            (Distribution, low) = (new double[reached.Length], new double[reached.Length]);
        }
    }

    /// <summary>The last step that counted, once the sums are done.</summary>
    public long LastStep { get; private set; } = -1;

    public bool IsDone { get; private set; }

    /// <summary>How many weights the window has.</summary>
    public long Width => window.Right - window.Left + 1;

    /// <summary>How many steps may be needed at most.</summary>
    public long Right => window.Right;

    /// <summary>The mass that all later weights can still see at most, as a share of a reward's largest entry.</summary>
    public double Left { get; private set; }

    /// <summary>The same for totals, in steps.</summary>
    public double LeftOfTotals { get; private set; }

    /// <summary>The weighted sum of the vectors; complete once <see cref="Finish"/> was called.</summary>
    public double[]? Distribution { get; }

    public double Rate(int reward) => rates[reward].Value;

    /// <summary>The sum of what is earned, weighted by tails, in steps.</summary>
    public double Total(int reward) => totals[reward].Value;

    /// <summary>Takes in the vector of step k.</summary>
    public void Add(long k)
    {
        var weight = window.Weight(k);
        for (var r = 0; r < rates.Length && weight > 0; r++)
        {
            rates[r].AddProduct(weight, step.Earned(r));
        }

        for (var r = 0; r < totals.Length; r++)
        {
            totals[r].AddProduct(window.Tail(k), step.Earned(rates.Length + r));
        }

        if (Distribution is not null && weight > 0)
        {
            AddVector(weight);
        }

        // A look at what is left costs as much as a vector: not at every step.
        if (k >= window.Right || (k >= window.Mean.High && (k < 32 || k % 16 == 0)))
        {
            IsDone = Check(k) || k >= window.Right;
            LastStep = k;
        }
    }

    /// <summary>Brings the two parts of the distribution together.</summary>
    public void Finish()
    {
        for (var i = 0; Distribution is not null && i < Distribution.Length; i++)
        {
            Distribution[i] += low![i];
        }
    }

    private void AddVector(double weight)
    {
        var vector = step.Vector;
        for (var i = 0; i < vector.Length; i++)
        {
            var product = weight * vector[i];
            var small = Math.FusedMultiplyAdd(weight, vector[i], -product);
            var sum = Distribution![i] + product;
            var part = sum - Distribution[i];
            low![i] += (Distribution[i] - (sum - part)) + (product - part) + small;
            Distribution[i] = sum;
        }
    }

    private bool Check(long k)
    {
        // Mass only falls, but a sum of it may be off a little.
        var mass = Math.Min(step.Mass, startMass) * (1 + 1e-9);
        Left = mass * Math.Max(window.Tail(k), window.LeftOut);
        LeftOfTotals = mass * window.TailsBeyond(k);
        for (var r = 0; r < rates.Length; r++)
        {
            var largest = step.Largest(r);
            if (largest > 0 && Left * largest > rates[r].Value * Settled)
            {
                return false;
            }
        }

        for (var r = 0; r < totals.Length; r++)
        {
            var largest = step.Largest(rates.Length + r);
            if (largest > 0 && LeftOfTotals * largest > totals[r].Value * Settled)
            {
                return false;
            }
        }

        for (var i = 0; reached is not null && i < reached.Length; i++)
        {
            if (reached[i] && Left > Distribution![i] * Settled)
            {
                return false;
            }
        }

        return true;
    }
}
