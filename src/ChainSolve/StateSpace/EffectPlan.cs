using ChainSolve.Expressions;
using ChainSolve.Modelling;

namespace ChainSolve.StateSpace;

/// <summary>The effects of a transition, made ready to be applied. Immutable; safe to share between threads.</summary>
internal sealed class EffectPlan
{
    /// <param name="transition">The transition.</param>
    /// <param name="counters">The ranges of all counters.</param>
    public EffectPlan(BoundTransition transition, CounterRange[] counters)
    {
        Transition = transition;
        var outputs = new List<Expr>();
        Moves =
        [
            .. transition.Effects.OfType<MoveEffect>().Select(m => new MovePlan(
                m,
                m.Count is null ? null : Amount.Of(m.Count, outputs),
                [.. m.Targets.Select(t => (t.To, t.Probability is null ? new Amount(1, -1) : Amount.Of(t.Probability, outputs)))])),
        ];
        Assignments = [.. transition.Effects.OfType<AssignEffect>().Select(a => (a.Variable, Amount.Of(a.Value, outputs)))];
        Program = outputs.Count == 0 ? null : ExprCompiler.Compile(outputs);
        IsPlain = Moves.All(m => m.Targets.Length == 1);
        Drawn = IsPlain ? null : Moves.FirstOrDefault(m => m.Targets.Length > 1);
        Steps = FixedSteps(counters);
        Needs = Steps is null ? null : NeedsOf(Steps, counters);
    }

    public BoundTransition Transition { get; }

    public MovePlan[] Moves { get; }

    public (int Variable, Amount Value)[] Assignments { get; }

    /// <summary>Gives the amounts that are not fixed; null where all are.</summary>
    public IExprProgram? Program { get; }

    /// <summary>Whether no target is drawn, so that there is one outcome.</summary>
    public bool IsPlain { get; }

    /// <summary>
    /// By how much each counter changes, where the transition moves fixed numbers of replicas, adds fixed numbers to counters and does nothing
    /// else, so that it changes the key of every state by the same amount; null for others. One replica may go where it is drawn to, by chances
    /// that are the same in every state: then there is such an amount for each target.
    /// </summary>
    public (int Counter, int Step)[]? Steps { get; }

    /// <summary>The first line whose target is drawn; null where no target is.</summary>
    public MovePlan? Drawn { get; }

    /// <summary>Whether the transition changes the key of every state by the same amount, if it is possible.</summary>
    public bool IsShift => Needs is not null && IsPlain;

    /// <summary>Where the variables have to be for a transition with <see cref="Steps"/> to be possible; null for other transitions.</summary>
    public VariableRange[]? Needs { get; }

    private (int Counter, int Step)[]? FixedSteps(CounterRange[] counters)
    {
        var steps = Transition.Effects.OfType<AssignEffect>().Select(e => StepOf(e, counters)).ToList();
        var isFixed = (IsPlain || IsOneDraw()) && steps.All(s => s is not null)
            && Moves.All(m => m is { Count: { Output: < 0, Fixed: >= 0 and <= int.MaxValue } count, Effect.IfAny: false } && count.Fixed == Math.Floor(count.Fixed));
        return isFixed ? [.. steps.Select(s => s!.Value)] : null;
    }

    private bool IsOneDraw() =>
        Moves.Count(m => m.Targets.Length > 1) == 1 && Drawn!.Count is { Output: < 0, Fixed: 1 }
        && ExprReads.Of(Drawn.Effect.Targets.Select(t => t.Probability).OfType<Expr>()).Variables.Count == 0;

    // n = n + 1, n = n - 2, n = 3 + n; no more than the range is wide, so that its ends less the step are whole numbers that can be kept.
    private static (int Counter, int Step)? StepOf(AssignEffect effect, CounterRange[] counters)
    {
        if (effect.Value is not SumExpr { Terms: [var first, var second] } || first.IsSubtracted)
        {
            return null;
        }

        var (counter, step, sign) = first.Value is VariableExpr ? (first.Value, second.Value, second.IsSubtracted ? -1 : 1) : (second.Value, first.Value, 1);
        return counter is VariableExpr { Index: var index } && index == effect.Variable && !(second.IsSubtracted && counter == second.Value)
            && step is ConstantExpr { Value: var value } && value == Math.Floor(value)
            && counters.First(c => c.Variable == index) is var range && Math.Abs(value) <= Math.Min(int.MaxValue, (double)range.High - range.Low)
            ? (index, sign * (int)value)
            : null;
    }

    private VariableRange[] NeedsOf((int Counter, int Step)[] steps, CounterRange[] counters)
    {
        var places = Moves.GroupBy(m => m.Effect.From)
            .Select(g => new VariableRange(g.Key, Whole(g.Sum(m => m.Count!.Value.Fixed)), int.MaxValue))
            .Where(r => r.Least > 0);
        var values = steps.Select(s =>
        {
            var range = counters.First(c => c.Variable == s.Counter);
            return new VariableRange(s.Counter, Whole((double)range.Low - s.Step), Whole((double)range.High - s.Step));
        });
        return [.. places, .. values];
    }

    private static int Whole(double value) => (int)Math.Clamp(value, int.MinValue, int.MaxValue);
}

/// <summary>A line of replicas that move.</summary>
/// <param name="Effect">The line.</param>
/// <param name="Count">How many; null for all that the others leave.</param>
/// <param name="Targets">Where they go, with probabilities.</param>
internal sealed record MovePlan(MoveEffect Effect, Amount? Count, (int To, Amount Probability)[] Targets);
