using ChainSolve.Expressions;
using ChainSolve.Modelling;

namespace ChainSolve.StateSpace;

/// <summary>The effects of a transition, made ready to be applied. Immutable; safe to share between threads.</summary>
internal sealed class EffectPlan
{
    public EffectPlan(BoundTransition transition)
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
        Needs = FixedNeeds();
    }

    public BoundTransition Transition { get; }

    public MovePlan[] Moves { get; }

    public (int Variable, Amount Value)[] Assignments { get; }

    /// <summary>Gives the amounts that are not fixed; null where all are.</summary>
    public IExprProgram? Program { get; }

    /// <summary>Whether no target is drawn, so that there is one outcome.</summary>
    public bool IsPlain { get; }

    /// <summary>
    /// How many replicas have to be in which places, where the transition moves fixed numbers of replicas and does nothing else, so that
    /// it changes the key of every state by the same amount; null for others.
    /// </summary>
    public (int Place, int Count)[]? Needs { get; }

    private (int Place, int Count)[]? FixedNeeds()
    {
        var isFixed = IsPlain && Assignments.Length == 0
            && Moves.All(m => m is { Count: { Output: < 0, Fixed: >= 0 and <= int.MaxValue } count, Effect.IfAny: false } && count.Fixed == Math.Floor(count.Fixed));
        return isFixed
            ? [.. Moves.GroupBy(m => m.Effect.From).Select(g => (g.Key, (int)Math.Min(int.MaxValue, g.Sum(m => m.Count!.Value.Fixed))))]
            : null;
    }
}

/// <summary>A line of replicas that move.</summary>
/// <param name="Effect">The line.</param>
/// <param name="Count">How many; null for all that the others leave.</param>
/// <param name="Targets">Where they go, with probabilities.</param>
internal sealed record MovePlan(MoveEffect Effect, Amount? Count, (int To, Amount Probability)[] Targets);
