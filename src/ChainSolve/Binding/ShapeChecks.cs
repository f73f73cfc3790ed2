using ChainSolve.Expressions;
using ChainSolve.Modelling;

namespace ChainSolve.Binding;

/// <summary>Judges counts, starts, ranges and fixed probabilities for one set of givens.</summary>
internal sealed class ShapeChecks(double[] givens)
{
    // Whole numbers and sums of probabilities may be off by this.
    private const double Slack = 1e-9;

    /// <summary>What is wrong; null where nothing is.</summary>
    public Fault? Check(BoundItem item)
    {
        var count = GivenEvaluator.ValueOf(item.Count, givens);
        if (!IsWhole(count, 0))
        {
            return BindingFaults.CountNotWhole(item.Span, item.Name, count);
        }

        var start = item.Start.Select(s => GivenEvaluator.ValueOf(s, givens)).ToArray();
        var sum = start.Sum();
        if (item.StartIsDrawn)
        {
            var wrong = Array.FindIndex(start, s => !(s is >= 0 and <= 1 + Slack));
            return wrong >= 0 ? BindingFaults.StartShare(item.Span, item.Name, item.States[wrong], start[wrong])
                : Math.Abs(sum - 1) > Slack ? BindingFaults.StartShareSum(item.Span, item.Name, sum)
                : null;
        }

        var broken = Array.FindIndex(start, s => !IsWhole(s, 0));
        return broken >= 0 ? BindingFaults.StartNotWhole(item.Span, item.Name, item.States[broken], start[broken])
            : Math.Round(sum) != Math.Round(count) ? BindingFaults.StartCountSum(item.Span, item.Name, sum, count)
            : null;
    }

    /// <summary>What is wrong; null where nothing is.</summary>
    public Fault? Check(BoundCounter counter)
    {
        var (low, high) = (GivenEvaluator.ValueOf(counter.Low, givens), GivenEvaluator.ValueOf(counter.High, givens));
        var start = GivenEvaluator.ValueOf(counter.Start, givens);
        foreach (var (what, value) in new[] { ("low end", low), ("high end", high), ("start", start) })
        {
            if (!IsWhole(value, int.MinValue))
            {
                return BindingFaults.CounterNotWhole(counter.Span, counter.Name, what, value);
            }
        }

        return Math.Round(low) > Math.Round(high) ? BindingFaults.CounterBackwards(counter.Span, counter.Name, low, high)
            : Math.Round(start) < Math.Round(low) || Math.Round(start) > Math.Round(high)
                ? BindingFaults.CounterStart(counter.Span, counter.Name, start, low, high)
            : null;
    }

    /// <summary>What is wrong with a draw whose probabilities do not read the state; null where nothing is.</summary>
    public Fault? Check(MoveEffect draw)
    {
        if (draw.Targets.Count == 1 || ExprReads.Of(draw.Targets.Select(t => t.Probability!)).Variables.Count > 0)
        {
            return null;
        }

        var shares = draw.Targets.Select(t => GivenEvaluator.ValueOf(t.Probability!, givens)).ToArray();
        var wrong = Array.FindIndex(shares, s => !(s is >= 0 and <= 1 + Slack));
        return wrong >= 0 ? BindingFaults.TargetShare(draw.Span, shares[wrong])
            : Math.Abs(shares.Sum() - 1) > Slack ? BindingFaults.TargetSum(draw.Span, shares.Sum())
            : null;
    }

    private static bool IsWhole(double value, double least) =>
        value >= least - Slack && value <= int.MaxValue && Math.Abs(value - Math.Round(value)) <= Slack;
}
