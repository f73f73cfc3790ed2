using System.Numerics;
using System.Runtime.CompilerServices;
using ChainSolve.Expressions;

namespace ChainSolve.StateSpace;

/// <summary>What the transitions of a model do to keys. Immutable; safe to share between threads.</summary>
internal sealed class SuccessorKeys<TKey>
    where TKey : unmanaged, IBinaryInteger<TKey>
{
    private readonly TKey[] shifts;
    private readonly int[] positions;
    private readonly Lazy<SuccessorProgram<TKey>?> program;

    public SuccessorKeys(TransitionPlans plans)
    {
        Plans = plans;
        Codec = new KeyCodec<TKey>(plans.Layout);
        shifts = [.. plans.Effects.Select(Codec.ShiftOf)];

        // Those whose successors have to be worked out stand first; the others by their shifts as numbers with a sign, so that their
        // successors come out in order.
        Order = [.. Enumerable.Range(0, shifts.Length).OrderBy(t => plans.Effects[t].Needs is not null).ThenBy(t => shifts[t] ^ TKey.RotateRight(TKey.One, 1)).ThenBy(t => t)];
        positions = new int[Order.Length];
        for (var i = 0; i < Order.Length; i++)
        {
            positions[Order[i]] = i;
        }

        program = new(Compile);
    }

    public TransitionPlans Plans { get; }

    /// <summary>Packs and unpacks markings.</summary>
    public KeyCodec<TKey> Codec { get; }

    /// <summary>The transitions in the order of <see cref="Program"/>.</summary>
    public int[] Order { get; }

    /// <summary>One method for the successors of most states; null where none is to be compiled. Compiled on first use.</summary>
    public SuccessorProgram<TKey>? Program => program.Value;

    /// <summary>Where a transition stands in <see cref="Order"/>.</summary>
    public int PositionOf(int transition) => positions[transition];

    /// <summary>The key of a successor.</summary>
    /// <param name="from">The key of the state.</param>
    /// <param name="successors">Its successors.</param>
    /// <param name="successor">Which of them.</param>
    public TKey Of(TKey from, SuccessorList successors, int successor) => successors.IsShift(successor)
        ? unchecked(from + shifts[successors.Transition(successor)])
        : Codec.Pack(successors.Marking(successor));

    private SuccessorProgram<TKey>? Compile()
    {
        if (Plans.BackEnd == ExprBackEnd.Interpreted || !RuntimeFeature.IsDynamicCodeCompiled || Plans.Effects.All(e => e.Needs is null))
        {
            return null;
        }

        var rates = InstructionList.Of([.. Order.Select(t => TransitionPlans.RateOf(Plans.Model.Transitions[t]))]);
        return rates.Instructions.Length <= ExprCompiler.LongestMethod
            ? new SuccessorProgram<TKey>(SuccessorEmitter.Emit(Plans.Layout, rates, [.. Order.Select(StepOf)], typeof(TKey) == typeof(ulong) ? 1 : 2), Order.Length)
            : null;
    }

    private SuccessorStep StepOf(int transition) => new(UInt128.CreateTruncating(shifts[transition]), Plans.Effects[transition].Needs);
}
