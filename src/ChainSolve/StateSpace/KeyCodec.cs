using System.Numerics;

namespace ChainSolve.StateSpace;

/// <summary>Packs markings into keys and back. Immutable; safe to share between threads.</summary>
/// <typeparam name="TKey"><see cref="ulong"/> or <see cref="UInt128"/>.</typeparam>
internal sealed class KeyCodec<TKey>
    where TKey : unmanaged, IBinaryInteger<TKey>
{
    private readonly KeyField[] fields;
    private readonly int[] template;
    private readonly (int First, int Last, int Count)[] derived;

    public KeyCodec(StateLayout layout)
    {
        fields = layout.Fields;
        template = new int[layout.Model.Variables.Count];
        foreach (var counter in layout.Counters)
        {
            template[counter.Variable] = counter.Low;
        }

        var last = new List<(int, int, int)>();
        for (var i = 0; i < layout.Counts.Length; i++)
        {
            var item = layout.Model.Items[i];
            var end = item.FirstVariable + item.States.Count - 1;
            if (layout.Counts[i] == 1 && item.States.Count == 1)
            {
                template[end] = 1;
            }
            else if (layout.Counts[i] > 1)
            {
                last.Add((item.FirstVariable, end, layout.Counts[i]));
            }
        }

        derived = [.. last];
    }

    public TKey Pack(ReadOnlySpan<int> marking)
    {
        var key = TKey.Zero;
        foreach (ref readonly var field in fields.AsSpan())
        {
            var value = field.Kind == FieldKind.Place
                ? marking.Slice(field.Variable, field.Places).IndexOf(1)
                : marking[field.Variable] - field.Low;
            key |= TKey.CreateTruncating((uint)value) << field.Shift;
        }

        return key;
    }

    public void Unpack(TKey key, Span<int> marking)
    {
        template.CopyTo(marking);
        foreach (ref readonly var field in fields.AsSpan())
        {
            var mask = (TKey.One << field.Width) - TKey.One;
            var value = (int)uint.CreateTruncating((key >> field.Shift) & mask);
            if (field.Kind == FieldKind.Place)
            {
                marking[field.Variable + value] = 1;
            }
            else
            {
                marking[field.Variable] = value + field.Low;
            }
        }

        foreach (var (first, end, count) in derived)
        {
            var rest = count;
            for (var v = first; v < end; v++)
            {
                rest -= marking[v];
            }

            marking[end] = rest;
        }
    }
}
