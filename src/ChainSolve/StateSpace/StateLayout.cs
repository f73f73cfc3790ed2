using ChainSolve.Binding;
using ChainSolve.Modelling;

namespace ChainSolve.StateSpace;

/// <summary>How the markings of a model fit into keys: one field of bits for each thing that can differ.</summary>
/// <remarks>
/// A lone replica is kept as the number of its place; replicas as the counts in all places but the last, which follows. Keys order as the
/// markings do, field by field. Immutable; safe to share between threads.
/// </remarks>
internal sealed class StateLayout
{
    private StateLayout(BoundModel model, int[] counts, CounterRange[] counters)
    {
        Model = model;
        Counts = counts;
        Counters = counters;
        var fields = new List<KeyField>();
        for (var i = 0; i < model.Items.Count; i++)
        {
            AddItem(fields, model.Items[i], counts[i]);
        }

        foreach (var counter in counters)
        {
            Add(fields, new KeyField(FieldKind.Counter, counter.Variable, 1, counter.Low, Width(counter.High - (long)counter.Low)));
        }

        // The first field is the most significant one.
        var shift = 0;
        for (var f = fields.Count - 1; f >= 0; f--)
        {
            fields[f] = fields[f] with { Shift = shift };
            shift += fields[f].Width;
        }

        Fields = [.. fields];
        Bits = shift;
    }

    public BoundModel Model { get; }

    /// <summary>How many replicas each item has.</summary>
    public int[] Counts { get; }

    /// <summary>The range of each counter.</summary>
    public CounterRange[] Counters { get; }

    public KeyField[] Fields { get; }

    /// <summary>The width of a key.</summary>
    public int Bits { get; }

    /// <summary>The layout for some values of the givens, which have been judged already.</summary>
    public static StateLayout Of(BoundModel model, GivenValues givens)
    {
        int Whole(Expressions.NumberExpr expr) => checked((int)Math.Round(GivenEvaluator.ValueOf(expr, givens.AsSpan().ToArray())));
        return new StateLayout(
            model,
            [.. model.Items.Select(i => Whole(i.Count))],
            [.. model.Counters.Select(c => new CounterRange(c.Variable, Whole(c.Low), Whole(c.High)))]);
    }

    private static void AddItem(List<KeyField> fields, BoundItem item, int count)
    {
        var places = item.States.Count;
        if (count == 1)
        {
            Add(fields, new KeyField(FieldKind.Place, item.FirstVariable, places, 0, Width(places - 1)));
            return;
        }

        for (var place = 0; place < places - 1; place++)
        {
            Add(fields, new KeyField(FieldKind.Count, item.FirstVariable + place, 1, 0, Width(count)));
        }
    }

    private static void Add(List<KeyField> fields, KeyField field)
    {
        if (field.Width > 0)
        {
            fields.Add(field);
        }
    }

    private static int Width(long largest) => largest <= 0 ? 0 : 64 - System.Numerics.BitOperations.LeadingZeroCount((ulong)largest);
}

/// <summary>The range of a counter.</summary>
internal readonly record struct CounterRange(int Variable, int Low, int High);

/// <summary>A field of a key.</summary>
/// <param name="Kind">What it holds.</param>
/// <param name="Variable">The variable, or the first place of the item.</param>
/// <param name="Places">The number of places of a lone replica.</param>
/// <param name="Low">What is taken off the value.</param>
/// <param name="Width">Its width in bits.</param>
internal readonly record struct KeyField(FieldKind Kind, int Variable, int Places, int Low, int Width)
{
    /// <summary>The bits below it.</summary>
    public int Shift { get; init; }
}

/// <summary>What a field of a key holds.</summary>
internal enum FieldKind
{
    Place,
    Count,
    Counter,
}
