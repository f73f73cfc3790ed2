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
        Program = outputs.Count == 0 ? null : ExprCompiler.Compile(outputs, ExprBackEnd.Interpreted);
        IsPlain = Moves.All(m => m.Targets.Length == 1);
    }

    public BoundTransition Transition { get; }

    public MovePlan[] Moves { get; }

    public (int Variable, Amount Value)[] Assignments { get; }

    /// <summary>Gives the amounts that are not fixed; null where all are.</summary>
    public IExprProgram? Program { get; }

    /// <summary>Whether no target is drawn, so that there is one outcome.</summary>
    public bool IsPlain { get; }
}

/// <summary>A line of replicas that move.</summary>
/// <param name="Effect">The line.</param>
/// <param name="Count">How many; null for all that the others leave.</param>
/// <param name="Targets">Where they go, with probabilities.</param>
internal sealed record MovePlan(MoveEffect Effect, Amount? Count, (int To, Amount Probability)[] Targets);
