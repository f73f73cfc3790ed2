using System.Numerics;

namespace ChainSolve.StateSpace;

/// <summary>States as sorted keys.</summary>
internal sealed class KeyedStates<TKey>(KeyTable<TKey> table, SuccessorKeys<TKey> keys, long transitions) : StateTable
    where TKey : unmanaged, IBinaryInteger<TKey>
{
    public override int Count => table.Count;

    public override long MostTransitions => transitions;

    public override void ReadMarking(int state, Span<int> marking) => keys.Codec.Unpack(table[state], marking);

    public override int Find(ReadOnlySpan<int> marking) => table.IndexOf(keys.Codec.Pack(marking));

    public override int Find(int state, SuccessorList successors, int successor) => table.IndexOf(keys.Of(table[state], successors, successor));
}
