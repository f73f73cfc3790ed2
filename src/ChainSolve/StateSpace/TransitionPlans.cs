using ChainSolve.Expressions;
using ChainSolve.Modelling;

namespace ChainSolve.StateSpace;

/// <summary>The transitions of a model made ready to be worked out, for one layout of its states. Immutable; safe to share between threads.</summary>
internal sealed class TransitionPlans(BoundModel model, StateLayout layout, ExprBackEnd backEnd)
{
    public BoundModel Model { get; } = model;

    public StateLayout Layout { get; } = layout;

    /// <summary>How rates are evaluated.</summary>
    public ExprBackEnd BackEnd { get; } = backEnd;

    /// <summary>The effects of each transition.</summary>
    public EffectPlan[] Effects { get; } = [.. model.Transitions.Select(t => new EffectPlan(t, layout.Counters))];

    /// <summary>The rates of all transitions: 0 where the guard does not hold.</summary>
    public IExprProgram Rates { get; } = ExprCompiler.Compile([.. model.Transitions.Select(RateOf)], backEnd);

    /// <summary>The rate of a transition: 0 where its guard does not hold.</summary>
    public static NumberExpr RateOf(BoundTransition transition) =>
        transition.Guard is null ? transition.Rate : new ChooseNumberExpr(transition.Guard, transition.Rate, new ConstantExpr(0));
}
