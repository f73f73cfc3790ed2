using System.Numerics;
using ChainSolve.Modelling;

namespace ChainSolve.StateSpace;

/// <summary>States as keys.</summary>
internal sealed class KeyedStates<TKey>(KeySet<TKey> states, SuccessorKeys<TKey> keys, int count, long transitions) : StateTable
    where TKey : unmanaged, IBinaryInteger<TKey>
{
    private const int KeysAtOnce = 256;

    public override int Count => count;

    public override long TransitionCount => transitions;

    public override void ReadMarking(int state, Span<int> marking)
    {
        Span<TKey> key = stackalloc TKey[1];
        states.CopyKeys(state, key);
        keys.Codec.Unpack(key[0], marking);
    }

    public override void Visit(int first, int count, Visitor visitor)
    {
        var marking = new int[keys.Plans.Model.Variables.Count];
        var read = new TKey[Math.Min(count, KeysAtOnce)];
        for (var done = 0; done < count; done += read.Length)
        {
            var part = read.AsSpan(0, Math.Min(read.Length, count - done));
            states.CopyKeys(first + done, part);
            for (var i = 0; i < part.Length; i++)
            {
                keys.Codec.Unpack(part[i], marking);
                visitor(first + done + i, marking);
            }
        }
    }

    public override int Find(ReadOnlySpan<int> marking)
    {
        Span<int> number = stackalloc int[1];
        states.Find([keys.Codec.Pack(marking)], number);
        return number[0];
    }

    public override StateRows Rows(GivenValues givens, CancellationToken cancellation) =>
        new KeyedRows<TKey>(states, new SuccessorRow<TKey>(keys, givens, cancellation));
}
