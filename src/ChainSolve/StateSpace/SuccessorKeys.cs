using System.Numerics;
using System.Runtime.CompilerServices;
using ChainSolve.Expressions;

namespace ChainSolve.StateSpace;

/// <summary>What the transitions of a model do to keys. Immutable; safe to share between threads.</summary>
internal sealed class SuccessorKeys<TKey>
    where TKey : unmanaged, IBinaryInteger<TKey>
{
    private readonly TKey[] shifts;
    private readonly Lazy<SuccessorProgram<TKey>?> program;

    public SuccessorKeys(TransitionPlans plans)
    {
        Plans = plans;
        Codec = new KeyCodec<TKey>(plans.Layout);
        shifts = [.. plans.Effects.Select(e => Codec.ShiftOf(e, 0))];

        // Those whose successors have to be worked out stand first; the others by their shifts as numbers with a sign, so that their
        // successors come out in order.
        var steps = Enumerable.Range(0, shifts.Length).SelectMany(StepsOf).ToList();
        steps.Sort(Compare);
        Outcomes = [.. steps.Select(s => s.Outcome)];
        program = new(() => Compile([.. steps.Select(s => s.Step)]));
    }

    public TransitionPlans Plans { get; }

    /// <summary>Packs and unpacks markings.</summary>
    public KeyCodec<TKey> Codec { get; }

    /// <summary>What can come of each transition, in the order of <see cref="Program"/>.</summary>
    public (int Transition, int Target)[] Outcomes { get; }

    /// <summary>Whether the program does all states in which nothing is at fault.</summary>
    public bool IsCompiled => IsForCompiling && Plans.Effects.All(e => e.Needs is not null);

    /// <summary>One method for the successors of most states; null where none is to be compiled. Compiled on first use.</summary>
    public SuccessorProgram<TKey>? Program => program.Value;

    /// <summary>The key of a successor.</summary>
    /// <param name="from">The key of the state.</param>
    /// <param name="successors">Its successors.</param>
    /// <param name="successor">Which of them.</param>
    public TKey Of(TKey from, SuccessorList successors, int successor) => successors.IsShift(successor)
        ? unchecked(from + shifts[successors.Transition(successor)])
        : Codec.Pack(successors.Marking(successor));

    private bool IsForCompiling => Plans.BackEnd != ExprBackEnd.Interpreted && RuntimeFeature.IsDynamicCodeCompiled;

    private static int Compare(((int Transition, int Target) Outcome, SuccessorStep Step) one, ((int Transition, int Target) Outcome, SuccessorStep Step) other)
    {
        if (one.Step.Needs is null != other.Step.Needs is null)
        {
            return one.Step.Needs is null ? -1 : 1;
        }

        var sign = UInt128.One << (typeof(TKey) == typeof(ulong) ? 63 : 127);
        var byShift = (one.Step.Shift ^ sign).CompareTo(other.Step.Shift ^ sign);
        return byShift != 0 ? byShift : one.Outcome.CompareTo(other.Outcome);
    }

    private IEnumerable<((int Transition, int Target) Outcome, SuccessorStep Step)> StepsOf(int transition)
    {
        var effects = Plans.Effects[transition];
        var isDrawn = effects.Needs is not null && !effects.IsPlain;
        for (var target = 0; target < (isDrawn ? effects.Drawn!.Targets.Length : 1); target++)
        {
            yield return ((transition, target), new SuccessorStep(UInt128.CreateTruncating(Codec.ShiftOf(effects, target)), effects.Needs, isDrawn));
        }
    }

    private SuccessorProgram<TKey>? Compile(SuccessorStep[] steps)
    {
        if (!IsForCompiling || steps.All(s => s.Needs is null))
        {
            return null;
        }

        var ofTransitions = Plans.Model.Transitions.Select(TransitionPlans.RateOf).ToArray();
        var rates = InstructionList.Of([.. Outcomes.Select(o => ofTransitions[o.Transition])]);
        return rates.Instructions.Length <= ExprCompiler.LongestMethod
            ? new SuccessorProgram<TKey>(SuccessorEmitter.Emit(Plans.Layout, rates, steps, typeof(TKey) == typeof(ulong) ? 1 : 2), steps.Length)
            : null;
    }
}
