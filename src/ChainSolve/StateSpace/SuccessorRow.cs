using System.Numerics;
using ChainSolve.Expressions;
using ChainSolve.Modelling;

namespace ChainSolve.StateSpace;

/// <summary>
/// The successors of one state by ascending keys, each once, with the rates to it; the state itself is none of them. Reused from state to
/// state; belongs to one thread.
/// </summary>
/// <remarks>Where nothing needs a closer look, a compiled method does it; the finder does the other states, and gives the same digits.</remarks>
internal sealed class SuccessorRow<TKey>
    where TKey : unmanaged, IBinaryInteger<TKey>
{
    // Compiling takes tens of milliseconds where it is the first time in a process, and then one or so.
    private const int StatesUntilCompiled = 5_000;

    private const int FewSuccessors = 32;

    private readonly SuccessorKeys<TKey> keys;
    private readonly SuccessorFinder finder;
    private readonly double[] givens;
    private readonly int[] marking;
    private readonly bool[] happened;
    private readonly bool[] happens;
    private TKey[] rowKeys;
    private double[] rowRates;
    private Arrival[] arrivals = [];
    private SuccessorProgram<TKey>? program;
    private double[] factors = [];
    private int untilCompiled;

    public SuccessorRow(SuccessorKeys<TKey> keys, GivenValues givens, CancellationToken cancellation)
    {
        this.keys = keys;
        this.givens = givens.AsSpan().ToArray();
        var model = keys.Plans.Model;
        finder = new SuccessorFinder(keys.Plans, givens, cancellation);
        marking = new int[model.Variables.Count];
        happened = new bool[model.Transitions.Count];
        happens = new bool[keys.Outcomes.Length];
        rowKeys = new TKey[keys.Outcomes.Length];
        rowRates = new double[keys.Outcomes.Length];
        untilCompiled = keys.Plans.BackEnd == ExprBackEnd.Compiled ? 1 : StatesUntilCompiled;
    }

    public int Count { get; private set; }

    public ReadOnlySpan<TKey> Keys => rowKeys.AsSpan(0, Count);

    public ReadOnlySpan<double> Rates => rowRates.AsSpan(0, Count);

    /// <summary>Which transitions were possible in some state so far.</summary>
    public bool[] Happens()
    {
        var all = (bool[])happened.Clone();
        for (var i = 0; i < happens.Length; i++)
        {
            all[keys.Outcomes[i].Transition] |= happens[i];
        }

        return all;
    }

    /// <summary>Finds the successors of a state.</summary>
    /// <exception cref="StateFaultException">Something that is enabled in the state is not possible.</exception>
    /// <exception cref="LimitExceededException">More is drawn in the state than fits into memory.</exception>
    public void Find(TKey key)
    {
        if (untilCompiled > 0 && --untilCompiled == 0)
        {
            program = keys.Program;
            factors = [.. keys.Outcomes.Select(o => finder.Factors(keys.Plans.Effects[o.Transition])).Zip(keys.Outcomes, (f, o) => f[o.Target])];
        }

        Count = program?.Run(key, givens, rowRates, rowKeys, happens, factors) ?? -1;
        if (Count < 0)
        {
            keys.Codec.Unpack(key, marking);
            finder.Find(marking);
            Sort(key, finder.Successors);
        }
    }

    // Those of one key stay in the order of the transitions, so that their rates are always added in that order.
    private void Sort(TKey key, SuccessorList successors)
    {
        if (successors.Count > rowKeys.Length)
        {
            (rowKeys, rowRates) = (new TKey[2 * successors.Count], new double[2 * successors.Count]);
        }

        if (successors.Count > arrivals.Length)
        {
            arrivals = new Arrival[2 * successors.Count];
        }

        for (var s = 0; s < successors.Count; s++)
        {
            arrivals[s] = new Arrival(keys.Of(key, successors, s), s);
            happened[successors.Transition(s)] = true;
        }

        Sort(arrivals.AsSpan(0, successors.Count));
        Count = 0;
        foreach (var (next, s) in arrivals.AsSpan(0, successors.Count))
        {
            // A rate may underflow to 0 when it is shared out among drawn targets; the target stays reachable.
            if (Count > 0 && rowKeys[Count - 1] == next)
            {
                rowRates[Count - 1] += successors.Rate(s);
            }
            else if (next != key)
            {
                rowKeys[Count] = next;
                rowRates[Count++] = successors.Rate(s);
            }
        }
    }

    private static void Sort(Span<Arrival> arrivals)
    {
        if (arrivals.Length > FewSuccessors)
        {
            arrivals.Sort();
            return;
        }

        for (var i = 1; i < arrivals.Length; i++)
        {
            var arrival = arrivals[i];
            var at = i;
            for (; at > 0 && arrivals[at - 1].Key > arrival.Key; at--)
            {
                arrivals[at] = arrivals[at - 1];
            }

            arrivals[at] = arrival;
        }
    }

    private readonly record struct Arrival(TKey Key, int Successor) : IComparable<Arrival>
    {
        public int CompareTo(Arrival other) => Key == other.Key ? Successor.CompareTo(other.Successor) : Key.CompareTo(other.Key);
    }
}
