using ChainSolve.Numerics.Arithmetic;
using ChainSolve.Numerics.Iteration;
using ChainSolve.Numerics.Operators;
using ChainSolve.Numerics.Structure;

namespace ChainSolve.Numerics.Transient;

/// <summary>
/// The states that a start can reach without leaving those that count, numbered anew and in order, and one more state that
/// takes in what is lost, where anything can be. Rows of its transition matrix add to one. Immutable.
/// </summary>
internal sealed class ReachedChain
{
    // Rates beyond these leave no room for products and rests of two doubles.
    private const double SmallestRate = 1e-280;
    private const double LargestRate = 1e280;

    private readonly Lazy<bool[]> paths;

    private ReachedChain(int[] states, int[][] targets, DoubleDouble[][] rates, bool isLossy, double largestExit)
    {
        States = states;
        Targets = targets;
        Rates = rates;
        IsLossy = isLossy;
        LargestExit = largestExit;
        MostTransitions = targets.Max(t => t.Length);
        paths = new Lazy<bool[]>(FindPaths);
    }

    /// <summary>The number of each state in the whole chain, ascending.</summary>
    public int[] States { get; }

    /// <summary>The number of rows of the transition matrix.</summary>
    public int Count => Targets.Length;

    /// <summary>Whether the last row and column are those of the state that takes in what is lost.</summary>
    public bool IsLossy { get; }

    /// <summary>The targets of each state, in the new numbers.</summary>
    public int[][] Targets { get; }

    /// <summary>The rates to them.</summary>
    public DoubleDouble[][] Rates { get; }

    /// <summary>An upper bound on the exit rates, off by next to nothing; 0 where nothing moves.</summary>
    public double LargestExit { get; }

    public int MostTransitions { get; }

    /// <summary>Which state can be reached from which, row after row; each reaches itself.</summary>
    public bool[] Paths => paths.Value;

    /// <summary>The states that can be reached from a set without leaving those that count.</summary>
    public static bool[] Reach(Generator generator, double[] start, bool[]? alive) =>
        Reachability.From(generator, Array.ConvertAll(start, p => p > 0), alive);

    /// <summary>Throws where rates are too small or too large to compute with.</summary>
    public static void CheckRange(double largestExit)
    {
        if (largestExit is not 0 and (< SmallestRate or > LargestRate))
        {
            throw new NotConvergedException(
                $"The largest exit rate is {largestExit:g3}, outside of {SmallestRate:g1} to {LargestRate:g1}. Choose another unit of time.");
        }
    }

    public static ReachedChain Of(Generator generator, bool[] reached)
    {
        int[] states = [.. Enumerable.Range(0, reached.Length).Where(i => reached[i])];
        var number = new int[reached.Length];
        Array.Fill(number, states.Length);
        for (var k = 0; k < states.Length; k++)
        {
            number[states[k]] = k;
        }

        var rows = generator.Rows;
        var targets = new List<int[]>(states.Length + 1);
        var rates = new List<DoubleDouble[]>(states.Length + 1);
        var isLossy = false;
        DoubleDouble largest = 0;
        foreach (var state in states)
        {
            var (to, at) = (new List<int>(), new List<DoubleDouble>());
            DoubleDouble lost = 0;
            DoubleDouble exit = 0;
            for (var e = rows.Offsets[state]; e < rows.Offsets[state + 1]; e++)
            {
                var rate = rows.Values[e];
                exit += rate;
                if (reached[rows.Targets[e]] && rate > 0)
                {
                    to.Add(number[rows.Targets[e]]);
                    at.Add(rate);
                }
                else
                {
                    lost += rate;
                }
            }

            if (lost.High > 0)
            {
                to.Add(states.Length);
                at.Add(lost);
                isLossy = true;
            }

            targets.Add([.. to]);
            rates.Add([.. at]);
            largest = exit > largest ? exit : largest;
        }

        if (isLossy)
        {
            targets.Add([]);
            rates.Add([]);
        }

        var top = largest.High == 0 ? 0 : Math.BitIncrement(largest.High);
        CheckRange(top);
        return new ReachedChain(states, [.. targets], [.. rates], isLossy, top);
    }

    /// <summary>From which states each of some columns of rewards can be earned, in the order of the block.</summary>
    public bool[] PathsTo(WideBlock rewards)
    {
        var sources = new List<int>[Count];
        for (var i = 0; i < Count; i++)
        {
            sources[i] = [];
        }

        for (var i = 0; i < Count; i++)
        {
            foreach (var target in Targets[i])
            {
                sources[target].Add(i);
            }
        }

        var columns = rewards.Columns;
        var pattern = Array.ConvertAll(rewards.High, r => r > 0);
        var open = new Stack<int>(Enumerable.Range(0, pattern.Length).Where(at => pattern[at]));
        while (open.TryPop(out var at))
        {
            foreach (var source in sources[at / columns])
            {
                var next = (source * columns) + (at % columns);
                if (!pattern[next])
                {
                    pattern[next] = true;
                    open.Push(next);
                }
            }
        }

        return pattern;
    }

    private bool[] FindPaths()
    {
        var pattern = new bool[(long)Count * Count];
        var open = new Stack<int>();
        for (var i = 0; i < Count; i++)
        {
            var row = i * Count;
            pattern[row + i] = true;
            open.Push(i);
            while (open.TryPop(out var at))
            {
                foreach (var next in Targets[at])
                {
                    if (!pattern[row + next])
                    {
                        pattern[row + next] = true;
                        open.Push(next);
                    }
                }
            }
        }

        return pattern;
    }
}
