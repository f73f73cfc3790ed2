using ChainSolve.Modelling;
using ChainSolve.Tests.Expressions;

namespace ChainSolve.Tests.StateSpace;

/// <summary>
/// Explores a bound model replica by replica: whole markings as text, every expression by plain recursion, every drawn replica on its own.
/// Slow, short, and without keys, plans or programs.
/// </summary>
internal sealed class SlowExplorer(BoundModel model, double[] givens)
{
    /// <summary>The rates between different reachable markings, by the markings' numbers separated by blanks.</summary>
    public Dictionary<string, Dictionary<string, double>> Explore(IEnumerable<int[]> starts)
    {
        var found = new Dictionary<string, Dictionary<string, double>>();
        var open = new Queue<int[]>(starts);
        while (open.TryDequeue(out var marking))
        {
            if (found.TryAdd(Name(marking), []))
            {
                foreach (var (next, rate) in Successors(marking))
                {
                    open.Enqueue(next);
                    if (Name(next) != Name(marking))
                    {
                        var row = found[Name(marking)];
                        row[Name(next)] = row.GetValueOrDefault(Name(next)) + rate;
                    }
                }
            }
        }

        return found;
    }

    public static string Name(int[] marking) => string.Join(' ', marking);

    private IEnumerable<(int[] Marking, double Rate)> Successors(int[] marking)
    {
        foreach (var transition in model.Transitions)
        {
            if (transition.Guard is { } guard && DirectEvaluation.Of(guard, marking, givens) != 1)
            {
                continue;
            }

            var rate = DirectEvaluation.Of(transition.Rate, marking, givens);
            if (rate > 0)
            {
                foreach (var (next, chance) in Outcomes(transition, marking))
                {
                    yield return (next, rate * chance);
                }
            }
        }
    }

    private List<(int[] Marking, double Chance)> Outcomes(BoundTransition transition, int[] before)
    {
        var after = (int[])before.Clone();
        foreach (var assign in transition.Effects.OfType<AssignEffect>())
        {
            after[assign.Variable] = (int)DirectEvaluation.Of(assign.Value, before, givens);
        }

        // Lines with a number take theirs in order; those that take all come last.
        var left = (int[])before.Clone();
        var outcomes = new List<(int[] Marking, double Chance)> { (after, 1) };
        foreach (var move in transition.Effects.OfType<MoveEffect>().OrderBy(m => m.Count is null))
        {
            var wanted = move.Count is null ? left[move.From] : (int)DirectEvaluation.Of(move.Count, before, givens);
            if (wanted > left[move.From])
            {
                Assert.True(move.IfAny);
                wanted = 0;
            }

            left[move.From] -= wanted;
            for (var replica = 0; replica < wanted; replica++)
            {
                outcomes = [.. outcomes.SelectMany(o => Go(o, move, before))];
            }
        }

        return outcomes;
    }

    private IEnumerable<(int[] Marking, double Chance)> Go((int[] Marking, double Chance) outcome, MoveEffect move, int[] before)
    {
        foreach (var target in move.Targets)
        {
            var chance = target.Probability is null ? 1 : DirectEvaluation.Of(target.Probability, before, givens);
            if (chance > 0)
            {
                var next = (int[])outcome.Marking.Clone();
                next[move.From]--;
                next[target.To]++;
                yield return (next, outcome.Chance * chance);
            }
        }
    }
}
