using System.Numerics;
using System.Reflection.Emit;
using System.Runtime.InteropServices;

namespace ChainSolve.StateSpace;

/// <summary>
/// One compiled method for a whole model, from the key of a state to those of its successors. It gives up where something needs a closer look.
/// Immutable; safe to share between threads.
/// </summary>
internal sealed class SuccessorProgram<TKey>
    where TKey : unmanaged, IBinaryInteger<TKey>
{
    private readonly Body body;
    private readonly int outcomes;

    /// <param name="method">A method from <see cref="SuccessorEmitter"/>.</param>
    /// <param name="outcomes">How many outcomes all transitions have together.</param>
    public SuccessorProgram(DynamicMethod method, int outcomes) => (body, this.outcomes) = (method.CreateDelegate<Body>(), outcomes);

    private delegate int Body(ref ulong key, ref double givens, ref double rates, ref ulong keys, ref bool happens, ref double factors);

    /// <summary>Finds the successors of a state by ascending keys, each once; the state itself is none of them.</summary>
    /// <param name="key">The key of the state.</param>
    /// <param name="givens">One entry a given.</param>
    /// <param name="rates">Takes the rate to each successor; room for one an outcome.</param>
    /// <param name="keys">Takes the key of each; room for one an outcome.</param>
    /// <param name="happens">Takes true for each outcome of a transition that is possible, in the order of the program.</param>
    /// <param name="factors">What each drawn outcome multiplies its rate by, in that order.</param>
    /// <returns>How many there are; -1 where something needs a closer look.</returns>
    public int Run(TKey key, ReadOnlySpan<double> givens, Span<double> rates, Span<TKey> keys, Span<bool> happens, ReadOnlySpan<double> factors)
    {
        // The method reads and writes by offset, without bounds checks, as that of a compiled program does.
        ArgumentOutOfRangeException.ThrowIfLessThan(rates.Length, outcomes);
        ArgumentOutOfRangeException.ThrowIfLessThan(keys.Length, outcomes);
        ArgumentOutOfRangeException.ThrowIfLessThan(happens.Length, outcomes);
        ArgumentOutOfRangeException.ThrowIfLessThan(factors.Length, outcomes);
        return body(
            ref MemoryMarshal.GetReference(MemoryMarshal.Cast<TKey, ulong>(new Span<TKey>(ref key))),
            ref MemoryMarshal.GetReference(givens),
            ref MemoryMarshal.GetReference(rates),
            ref MemoryMarshal.GetReference(MemoryMarshal.Cast<TKey, ulong>(keys)),
            ref MemoryMarshal.GetReference(happens),
            ref MemoryMarshal.GetReference(factors));
    }
}
