using System.Text;
using ChainSolve.Tests.Shared.Chains;
using ChainSolve.Tests.Shared.Checks;

namespace ChainSolve.Tests.Checks;

/// <summary>How a chain of a check is said in the notation: its items, and conditions and rewards over them.</summary>
internal sealed record ChainWording
{
    /// <summary>Items, crews, counters and events.</summary>
    public required string Body { get; init; }

    /// <summary>A condition that holds in some states of the chain.</summary>
    public required Func<int[], string> Condition { get; init; }

    /// <summary>An expression that is one in one state, or at one level, and the clause that counts it.</summary>
    public required Func<double[], string> Reward { get; init; }

    public static ChainWording Of(CheckChain chain, ConcreteChain concrete) => chain.Family is null ? States(concrete) : Family(chain, concrete);

    private static string N(double value) => RandomChain.Number(value);

    private static ChainWording States(ConcreteChain chain)
    {
        var names = chain.Names.Select(Word).ToArray();
        var text = new StringBuilder();
        text.Append("item unit {\n    states ").AppendJoin(", ", names).Append('\n');
        var starts = Enumerable.Range(0, chain.Count).Where(i => chain.Start[i] > 0).ToArray();
        text.Append("    start ").AppendJoin(", ", starts.Select(i => starts.Length == 1 ? names[i] : $"{names[i]} {N(chain.Start[i])}")).Append('\n');
        foreach (var (from, to, rate) in chain.Moves)
        {
            text.Append("    ").Append(names[from]).Append(" -> ").Append(names[to]).Append(" at ").Append(N(rate)).Append('\n');
        }

        return new ChainWording
        {
            Body = text.Append("}\n").ToString(),
            Condition = states => string.Join(" or ", states.Select(i => $"unit is {names[i]}")),
            Reward = rewards => Clauses(rewards.Select((r, i) => (r, $"unit is {names[i]}"))),
        };
    }

    /// <summary>A name that the notation accepts.</summary>
    private static string Word(string name) =>
        char.IsLetter(name[0]) && name.All(c => char.IsLetterOrDigit(c) || c == '_')
            ? name
            : "s" + string.Concat(name.Select(c => char.IsLetterOrDigit(c) ? c : '_'));

    private static string Clauses(IEnumerable<(double Reward, string Condition)> parts) =>
        string.Join("; ", parts.Where(p => p.Reward != 0).Select(p => $"rate {N(p.Reward)} while {p.Condition}"));

    private static ChainWording Family(CheckChain chain, ConcreteChain concrete)
    {
        var start = Array.FindIndex(concrete.Start, p => p == 1);
        var (body, level) = FamilyText(chain, concrete.Levels[start]);
        return new ChainWording
        {
            Body = body,
            Condition = states => Levels(level, concrete, states),
            Reward = rewards =>
            {
                var byLevel = concrete.Levels.Zip(rewards).Distinct().ToList();
                if (byLevel.Count != byLevel.Select(p => p.First).Distinct().Count())
                {
                    throw new InvalidDataException("The rewards of a family must follow from the level.");
                }

                return byLevel.All(p => p.First == p.Second)
                    ? $"rate {level}"
                    : Clauses(byLevel.Select(p => (p.Second, $"{level} = {p.First}")));
            },
        };
    }

    private static string Levels(string level, ConcreteChain chain, int[] states)
    {
        var levels = states.Select(i => chain.Levels[i]).Distinct().Order().ToArray();
        if (levels.Length != levels[^1] - levels[0] + 1 || chain.Levels.Count(l => levels.Contains(l)) != states.Length)
        {
            throw new InvalidDataException("The states of a family must be a range of levels.");
        }

        return levels.Length == 1 ? $"{level} = {levels[0]}" : $"{level} >= {levels[0]} and {level} <= {levels[^1]}";
    }

    private static (string Body, string Level) FamilyText(CheckChain chain, int start)
    {
        switch (chain.Family)
        {
            case "birth-death":
                return ($$"""
                    counter n 0 .. {{chain.Levels}} start {{start}}
                    event arrive at {{N(chain.Birth)}} when n < {{chain.Levels}} { n = n + 1 }
                    event leave at {{N(chain.Death)}} * min(n, {{Math.Max(1, chain.Servers)}}) when n > 0 { n = n - 1 }

                    """, "n");
            case "erlang-loss":
                return ($$"""
                    item line x {{chain.Servers}} {
                        states idle, busy
                        busy -> idle at 1
                    }
                    event call at {{N(chain.Traffic)}} when line.idle >= 1 { line: idle -> busy }

                    """, "line.busy");
            case "machine-repair":
                return ($$"""
                    crew fitter = {{chain.Crews}}
                    item machine x {{chain.Units}} {
                        start up {{chain.Units - start}}, down {{start}}
                        up -> down at {{N(chain.Failure)}}
                        down -> up at {{N(chain.Repair)}} by fitter
                    }

                    """, "machine.down");
            case "ehrenfest":
                return ($$"""
                    item molecule x {{chain.Units}} {
                        start left {{chain.Units - start}}, right {{start}}
                        left -> right at {{N(chain.Rate)}}
                        right -> left at {{N(chain.Rate)}}
                    }

                    """, "molecule.right");
            case "independent-units":
                var units = chain.Failures!.Select((f, i) =>
                    $"item u{i} {{\n    up -> down at {N(f)}\n    down -> up at {N(chain.Repairs![i])}\n}}\n");
                return (string.Concat(units), "(" + string.Join(" + ", chain.Failures!.Select((_, i) => $"u{i}.up")) + ")");
            case "closed-network":
                var text = new StringBuilder();
                for (var i = 0; i < chain.Mu!.Length; i++)
                {
                    text.Append($"crew server{i} = 1\n");
                }

                text.Append($"item job x {chain.Customers} {{\n    states q0, q1, q2\n");
                for (var i = 0; i < chain.Mu.Length; i++)
                {
                    var targets = chain.Routing![i].Select((p, j) => (p, j)).Where(r => r.p > 0).ToArray();
                    text.Append($"    q{i} -> ")
                        .AppendJoin(", ", targets.Select(r => targets.Length == 1 ? $"q{r.j}" : $"q{r.j} {N(r.p)}"))
                        .Append($" at {N(chain.Mu[i])} by server{i}\n");
                }

                return (text.Append("}\n").ToString(), "job.q0");
            case "erlang-service":
                return ($$"""
                    counter n 0 .. {{chain.Levels}}
                    counter stage 1 .. 2
                    event arrive at {{N(chain.Arrival)}} when n < {{chain.Levels}} { n = n + 1 }
                    event first_stage at {{N(chain.StageRate)}} when n > 0 and stage = 1 { stage = 2 }
                    event last_stage at {{N(chain.StageRate)}} when n > 0 and stage = 2 { stage = 1; n = n - 1 }

                    """, "n");
            default:
                throw new InvalidDataException($"There is no family '{chain.Family}'.");
        }
    }
}
