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

    private readonly Lazy<PoissonWindow> window;
    private readonly double firstStep;
    private readonly UniformizedStep step;
    private readonly LongSum[] rates;
    private readonly LongSum[] totals;
    private readonly bool[]? reached;
    private readonly double[]? low;
    private readonly double[] rateSlack;
    private readonly double[] totalSlack;
    private readonly double startMass;
    private double[]? slack;

    /// <summary>Prepares the sums of one time.</summary>
    /// <param name="mean">How many steps there are up to the time on average.</param>
    /// <param name="step">The vectors; its rewards are first the rates, then the totals.</param>
    /// <param name="rateCount">How many of the rewards are rates.</param>
    /// <param name="totalCount">How many are totals.</param>
    /// <param name="reached">The states whose probabilities are wanted; null for none.</param>
    /// <param name="cancellation">Looked at while weights are computed.</param>
    public TimeSums(DoubleDouble mean, UniformizedStep step, int rateCount, int totalCount, bool[]? reached, CancellationToken cancellation)
    {
        Mean = mean;
        firstStep = GeometricSums.FirstStep(mean.High);
        window = new Lazy<PoissonWindow>(() => PoissonWindow.Of(mean, PoissonWindow.Deep, cancellation));
        this.step = step;
        this.reached = reached;
        rates = new LongSum[rateCount];
        totals = new LongSum[totalCount];
        (rateSlack, totalSlack) = (new double[rateCount], new double[totalCount]);
        startMass = step.Mass;
        if (reached is not null)
        {
            (Distribution, low) = (new double[reached.Length], new double[reached.Length]);
        }
    }

    /// <summary>How many steps there are up to the time on average.</summary>
    public DoubleDouble Mean { get; }

    /// <summary>The weights; computed on first use.</summary>
    public Func<PoissonWindow> Window => () => window.Value;

    /// <summary>The last step that counted, once the sums are done.</summary>
    public long LastStep { get; private set; } = -1;

    public bool IsDone { get; private set; }

    /// <summary>How many weights were summed.</summary>
    public long Width => window.IsValueCreated ? window.Value.Right - window.Value.Left + 1 : 0;

    /// <summary>A step beyond which there is no weight.</summary>
    /// <remarks>Bernstein: P(N ≥ mean + x) ≤ exp(-x²/(2 (mean + x/3))).</remarks>
    public double Horizon => Mean.High + 240 + Math.Sqrt((240.0 * 240) + (1400 * Mean.High));

    /// <summary>The mass that all later weights can still see at most, as a share of a reward's largest entry.</summary>
    public double Left { get; private set; }

    /// <summary>The same for totals, in steps.</summary>
    public double LeftOfTotals { get; private set; }

    /// <summary>The weighted sum of the vectors; complete once <see cref="Finish"/> was called.</summary>
    public double[]? Distribution { get; }

    public double Rate(int reward) => rates[reward].Value;

    /// <summary>The sum of what is earned, weighted by tails, in steps.</summary>
    public double Total(int reward) => totals[reward].Value;

    /// <summary>How far the weights of settled vectors may have put off a rate.</summary>
    public double RateSlack(int reward) => rateSlack[reward];

    /// <summary>The same for a total, in steps.</summary>
    public double TotalSlack(int reward) => totalSlack[reward];

    /// <summary>The same for the probability of a state.</summary>
    public double Slack(int state) => slack is null ? 0 : slack[state];

    /// <summary>Takes in the vector of step k.</summary>
    public void Add(long k)
    {
        if (k < firstStep)
        {
            for (var r = 0; r < totals.Length; r++)
            {
                totals[r].Add(step.Earned(rates.Length + r));
            }

            return;
        }

        var weights = window.Value;
        var weight = weights.Weight(k);
        for (var r = 0; r < rates.Length && weight > 0; r++)
        {
            rates[r].AddProduct(weight, step.Earned(r));
        }

        for (var r = 0; r < totals.Length; r++)
        {
            totals[r].AddProduct(weights.Tail(k), step.Earned(rates.Length + r));
        }

        if (Distribution is not null && weight > 0)
        {
            AddVector(weight, step.Vector);
        }

        // A look at what is left costs as much as a vector: not at every step.
        if (k >= weights.Right || (k >= weights.Mean.High && (k < 32 || k % 16 == 0)))
        {
            IsDone = Check(weights, k) || k >= weights.Right;
            LastStep = k;
        }
    }

    /// <summary>Takes in a vector with all that follows from it.</summary>
    /// <param name="weight">What it counts for.</param>
    /// <param name="earned">Its products with the rewards.</param>
    /// <param name="vector">The vector.</param>
    public void AddSettled(SettledWeight weight, double[] earned, ReadOnlySpan<double> vector)
    {
        for (var r = 0; r < rates.Length; r++)
        {
            rates[r].AddProduct(weight.AtTime, earned[r]);
            rateSlack[r] += weight.AtTime * earned[r] * weight.Error;
        }

        for (var r = 0; r < totals.Length; r++)
        {
            totals[r].AddProduct(weight.UpToTime, earned[rates.Length + r]);
            totalSlack[r] += weight.UpToTime * earned[rates.Length + r] * weight.UpToError;
        }

        if (Distribution is null)
        {
            return;
        }

        AddVector(weight.AtTime, vector);
        slack ??= new double[vector.Length];
        for (var i = 0; i < vector.Length; i++)
        {
            slack[i] += weight.AtTime * vector[i] * weight.Error;
        }
    }

    /// <summary>Says that all later vectors were taken in.</summary>
    public void Close(long steps)
    {
        (LastStep, IsDone) = (steps, true);
        (Left, LeftOfTotals) = (0, 0);
    }

    /// <summary>Brings the two parts of the distribution together.</summary>
    public void Finish()
    {
        for (var i = 0; Distribution is not null && i < Distribution.Length; i++)
        {
            Distribution[i] += low![i];
        }
    }

    private void AddVector(double weight, ReadOnlySpan<double> vector)
    {
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

    private bool Check(PoissonWindow weights, long k)
    {
        // Mass only falls, but a sum of it may be off a little.
        var mass = Math.Min(step.Mass, startMass) * (1 + 1e-9);
        Left = mass * Math.Max(weights.Tail(k), weights.LeftOut);
        LeftOfTotals = mass * weights.TailsBeyond(k);
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
