using System.Globalization;
using ChainSolve.Modelling;

namespace ChainSolve.StateSpace;

/// <summary>Applies the effects of a transition to a marking. Holds buffers: belongs to one thread.</summary>
internal sealed class EffectRunner(BoundModel model, StateLayout layout, double[] givens, SuccessorList successors, CancellationToken cancellation)
{
    private const double WholeSlack = 1e-9;
    private const double SumSlack = 1e-9;
    private const int MostCells = 1 << 25;

    private readonly int[] after = new int[model.Variables.Count];
    private readonly int[] left = new int[model.Variables.Count];
    private readonly Dictionary<int, CounterRange> ranges = layout.Counters.ToDictionary(c => c.Variable);
    private double[] outputs = [];

    /// <summary>Adds the successors that the transition leads to.</summary>
    public void Run(EffectPlan plan, int transition, double rate, ReadOnlySpan<int> before)
    {
        RunProgram(plan, before);
        before.CopyTo(after);
        Assign(plan);
        if (plan.Moves.Length == 0)
        {
            successors.Add(after, rate, transition);
            return;
        }

        Span<int> counts = plan.Moves.Length <= 32 ? stackalloc int[plan.Moves.Length] : new int[plan.Moves.Length];
        CountMoving(plan, before, counts);
        for (var m = 0; m < counts.Length; m++)
        {
            after[plan.Moves[m].Effect.From] -= counts[m];
        }

        if (!plan.IsPlain)
        {
            Draw(plan, counts.ToArray(), 0, transition, rate);
            return;
        }

        for (var m = 0; m < counts.Length; m++)
        {
            after[plan.Moves[m].Targets[0].To] += counts[m];
        }

        successors.Add(after, rate, transition);
    }

    /// <summary>By what the rate is multiplied for each target of a line by which one replica goes; its chances do not depend on the state.</summary>
    /// <exception cref="StateFaultException">The chances are none.</exception>
    public double[] Factors(EffectPlan plan, MovePlan move)
    {
        Array.Clear(after);
        RunProgram(plan, after);
        var chances = ChancesOf(plan, move);
        var rest = RestOf(chances);
        return [.. chances.Select(c => c / rest[0])];
    }

    private void RunProgram(EffectPlan plan, ReadOnlySpan<int> before)
    {
        if (plan.Program is { } program)
        {
            outputs = outputs.Length >= program.OutputCount ? outputs : new double[program.OutputCount];
            program.Run(before, givens, outputs);
        }
    }

    private void Assign(EffectPlan plan)
    {
        foreach (var (variable, amount) in plan.Assignments)
        {
            var value = amount.Read(outputs);
            var name = model.Variables[variable].Name;
            if (double.IsNaN(value))
            {
                throw Missing(plan, StateCodes.CounterNotWhole, $"the new value of {name}");
            }

            if (!double.IsFinite(value) || Math.Abs(value - Math.Round(value)) > WholeSlack)
            {
                throw Fault(plan, StateCodes.CounterNotWhole, $"{plan.Transition.Label} would set {name} to {value}, which is not a whole number");
            }

            var range = ranges[variable];
            var whole = Math.Round(value);
            if (whole < range.Low || whole > range.High)
            {
                throw Fault(plan, StateCodes.CounterRange, $"{plan.Transition.Label} would set {name} to {whole}, outside its range {range.Low} .. {range.High}; let it wait with 'when', or widen the range");
            }

            after[variable] = (int)whole;
        }
    }

    private void CountMoving(EffectPlan plan, ReadOnlySpan<int> before, Span<int> counts)
    {
        foreach (var move in plan.Moves)
        {
            left[move.Effect.From] = before[move.Effect.From];
        }

        for (var m = 0; m < counts.Length; m++)
        {
            var move = plan.Moves[m];
            counts[m] = 0;
            if (move.Count is not { } amount)
            {
                continue;
            }

            var wanted = amount.Read(outputs);
            if (double.IsNaN(wanted))
            {
                throw Missing(plan, StateCodes.MoveCount, $"the number of replicas that leave {NameOf(move)}");
            }

            if (!(wanted >= -WholeSlack) || Math.Abs(wanted - Math.Round(wanted)) > WholeSlack)
            {
                throw Fault(plan, StateCodes.MoveCount, $"{plan.Transition.Label} would move {wanted} replicas out of {NameOf(move)}; the number is whole and not negative");
            }

            if (Math.Round(wanted) <= left[move.Effect.From])
            {
                counts[m] = (int)Math.Round(wanted);
                left[move.Effect.From] -= counts[m];
            }
            else if (!move.Effect.IfAny)
            {
                throw Fault(plan, StateCodes.TooFew, $"{plan.Transition.Label} needs {Math.Round(wanted)} in {NameOf(move)}, where {left[move.Effect.From]} are left; let it wait with 'when', or skip the line with 'if any'");
            }
        }

        for (var m = 0; m < counts.Length; m++)
        {
            if (plan.Moves[m].Count is null)
            {
                counts[m] = left[plan.Moves[m].Effect.From];
                left[plan.Moves[m].Effect.From] = 0;
            }
        }
    }

    // Every line draws on its own; the replicas of a line are alike, so only how many go where counts.
    private void Draw(EffectPlan plan, int[] counts, int line, int transition, double rate)
    {
        if (line == plan.Moves.Length)
        {
            AddDrawn(plan, transition, rate);
            return;
        }

        var move = plan.Moves[line];
        if (move.Targets.Length == 1 || counts[line] == 0)
        {
            after[move.Targets[0].To] += counts[line];
            Draw(plan, counts, line + 1, transition, rate);
            after[move.Targets[0].To] -= counts[line];
            return;
        }

        var chances = ChancesOf(plan, move);
        var rest = RestOf(chances);
        Share(0, counts[line], rate);

        void Share(int target, int remaining, double weight)
        {
            if (target == chances.Length - 1 || remaining == 0)
            {
                Take(target, remaining, weight);
                return;
            }

            if (remaining == 1)
            {
                for (var t = target; t < chances.Length; t++)
                {
                    Take(t, 1, weight * (chances[t] / rest[target]));
                }

                return;
            }

            cancellation.ThrowIfCancellationRequested();
            var shares = BinomialLaw.Chances(remaining, chances[target] / rest[target], rest[target + 1] / rest[target]);
            for (var taken = 0; taken <= remaining; taken++)
            {
                if (weight * shares[taken] > 0)
                {
                    after[move.Targets[target].To] += taken;
                    Share(target + 1, remaining - taken, weight * shares[taken]);
                    after[move.Targets[target].To] -= taken;
                }
            }
        }

        void Take(int target, int taken, double weight)
        {
            if (weight > 0)
            {
                after[move.Targets[target].To] += taken;
                Draw(plan, counts, line + 1, transition, weight);
                after[move.Targets[target].To] -= taken;
            }
        }
    }

    // What is left for a target and all behind it, added from the end so that small chances keep their digits.
    private static double[] RestOf(double[] chances)
    {
        var rest = (double[])chances.Clone();
        for (var i = rest.Length - 2; i >= 0; i--)
        {
            rest[i] += rest[i + 1];
        }

        return rest;
    }

    private void AddDrawn(EffectPlan plan, int transition, double rate)
    {
        var most = MostCells / after.Length;
        if (successors.Count >= most)
        {
            throw new LimitExceededException("states", string.Create(
                CultureInfo.InvariantCulture,
                $"{plan.Transition.Label} draws more than {most:N0} outcomes in one state; let fewer replicas go at once, or to fewer targets"));
        }

        successors.Add(after, rate, transition);
    }

    private double[] ChancesOf(EffectPlan plan, MovePlan move)
    {
        var chances = new double[move.Targets.Length];
        var sum = 0.0;
        for (var i = 0; i < chances.Length; i++)
        {
            chances[i] = move.Targets[i].Probability.Read(outputs);
            if (double.IsNaN(chances[i]))
            {
                throw Missing(plan, StateCodes.Probability, $"the probability of {model.Variables[move.Targets[i].To].Name}");
            }

            if (!(chances[i] >= 0))
            {
                throw Fault(plan, StateCodes.Probability, $"{plan.Transition.Label} would go to {model.Variables[move.Targets[i].To].Name} with the probability {chances[i]}; a probability is not negative");
            }

            sum += chances[i];
        }

        if (!(Math.Abs(sum - 1) <= SumSlack))
        {
            throw Fault(plan, StateCodes.Probability, $"the probabilities of the targets of {plan.Transition.Label} add to {sum}, not to 1");
        }

        for (var i = 0; i < chances.Length; i++)
        {
            chances[i] /= sum;
        }

        return chances;
    }

    private string NameOf(MovePlan move) => model.Variables[move.Effect.From].Name;

    private static StateFaultException Missing(EffectPlan plan, string code, string what) =>
        Fault(plan, code, $"{plan.Transition.Label}: {what} does not exist; look for a division by zero");

    private static StateFaultException Fault(EffectPlan plan, string code, FormattableString message) =>
        new(code, plan.Transition, message.ToString(CultureInfo.InvariantCulture));
}
