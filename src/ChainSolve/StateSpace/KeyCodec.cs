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

    /// <summary>What one replica more in a place, or one more of a counter, adds to a key.</summary>
    private TKey UnitOf(int place)
    {
        foreach (var field in fields)
        {
            if (field.Kind == FieldKind.Place && place >= field.Variable && place < field.Variable + field.Places)
            {
                return TKey.CreateTruncating((uint)(place - field.Variable)) << field.Shift;
            }

            if (field.Kind != FieldKind.Place && place == field.Variable)
            {
                return TKey.One << field.Shift;
            }
        }

        return TKey.Zero;
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

    /// <summary>What a transition that always does the same adds to every key, modulo the size of a key; zero for other transitions.</summary>
    /// <param name="plan">The transition.</param>
    /// <param name="target">Where the one replica goes whose target is drawn, if there is one.</param>
    public TKey ShiftOf(EffectPlan plan, int target)
    {
        var shift = TKey.Zero;
        foreach (var move in plan.Needs is null ? [] : plan.Moves)
        {
            var count = TKey.CreateTruncating((uint)move.Count!.Value.Fixed);
            shift = unchecked(shift + (count * UnitOf(move.Targets[move == plan.Drawn ? target : 0].To)) - (count * UnitOf(move.Effect.From)));
        }

        foreach (var (counter, step) in plan.Steps ?? [])
        {
            shift = unchecked(shift + (TKey.CreateTruncating(step) * UnitOf(counter)));
        }

        return shift;
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
