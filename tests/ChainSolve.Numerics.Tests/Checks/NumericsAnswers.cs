using ChainSolve.Numerics.Absorption;
using ChainSolve.Numerics.Iteration;
using ChainSolve.Numerics.Operators;
using ChainSolve.Numerics.Stationary;
using ChainSolve.Numerics.Transient;
using ChainSolve.Tests.Shared.Checks;
using ChainSolve.Tests.Shared.Reference;

namespace ChainSolve.Numerics.Tests.Checks;

/// <summary>Answers the questions of the files of checks with the solvers that it is given.</summary>
internal sealed class NumericsAnswers(IStationarySolver stationary, IAbsorptionSolver absorption, ITransientSolver? transient = null)
{
    /// <summary>The answer, or null for a question that the solvers alone do not answer.</summary>
    public Bounded? Answer(CheckCase check)
    {
        var chain = ConcreteChain.From(check.Chain!);
        var generator = Build(chain);
        var ask = check.Ask;
        var of = Mask(chain, ask.Of is null && ask.Levels is null ? [] : chain.Select(ask.Of, ask.Levels));
        var to = Mask(chain, ask.To is null ? [] : chain.Select(ask.To, null));
        var rewards = ask.Rewards is { } element ? chain.Rewards(element) : [];
        Bounded? value = ask.What switch
        {
            "probability" or "expected" when ask.At is { } t => AtTime(generator, chain, rewards.Length == 0 ? Ones(of) : rewards, t, null),
            "probability" or "offered-traffic" => LongRun(generator, chain, Ones(of)),
            "expected" => LongRun(generator, chain, rewards),
            "ratio" => LongRun(generator, chain, rewards) / LongRun(generator, chain, chain.Rewards(ask.OverRewards!.Value)),
            "total" => Total(generator, chain, rewards, ask.Over!.Value),
            "average" => Total(generator, chain, rewards, ask.Over!.Value) / ask.Over!.Value,
            "mean-time" => Moment(generator, chain, to, 1),
            "moment" => Moment(generator, chain, to, ask.Order!.Value),
            "total-until" => Until(generator, chain, to, rewards),
            "ends-in" => EndsIn(generator, chain, of),
            "density" => AtTime(generator, chain, Flow(chain, to), ask.At!.Value, Not(to)),
            "frequency" => LongRun(generator, chain, Flow(chain, of)),
            "mean-spell" => LongRun(generator, chain, Ones(of)) / LongRun(generator, chain, Flow(chain, of)),
            "conditional-mean-time" => ConditionalMean(generator, chain, to, Not(of)),
            "kemeny" => Kemeny(generator, chain, ask.From!),
            _ => null,
        };
        return value is { } v ? v * ask.Scale : null;
    }

    public static Generator Build(ConcreteChain chain)
    {
        var builder = new GeneratorBuilder(chain.Count);
        foreach (var (from, to, rate) in chain.Moves)
        {
            builder.Add(from, to, rate);
        }

        return builder.Build();
    }

    private static bool[] Mask(ConcreteChain chain, int[] states)
    {
        var mask = new bool[chain.Count];
        states.ToList().ForEach(i => mask[i] = true);
        return mask;
    }

    private static bool[] Not(bool[] mask) => [.. mask.Select(m => !m)];

    private static double[] Ones(bool[] mask) => [.. mask.Select(m => m ? 1.0 : 0)];

    /// <summary>The rate at which each state outside enters a set.</summary>
    private static double[] Flow(ConcreteChain chain, bool[] into)
    {
        var flow = new double[chain.Count];
        foreach (var (from, to, rate) in chain.Moves)
        {
            flow[from] += into[to] && !into[from] ? rate : 0;
        }

        return flow;
    }

    private Bounded AtTime(Generator generator, ConcreteChain chain, double[] rewards, double time, bool[]? alive)
    {
        var problem = new TransientProblem { Generator = generator, Start = chain.Start, Alive = alive, Times = [time], Rates = [rewards] };
        var value = transient!.Solve(problem, SolveContext.Default).Rates[0][0];
        return new Bounded(value.Value, value.Bound);
    }

    private Bounded Total(Generator generator, ConcreteChain chain, double[] rewards, double time)
    {
        var problem = new TransientProblem
        {
            Generator = generator,
            Start = chain.Start,
            Times = [time],
            Totals = [[.. rewards.Select(r => Math.Max(r, 0))], [.. rewards.Select(r => Math.Max(-r, 0))]],
        };
        var values = transient!.Solve(problem, SolveContext.Default).Totals[0];
        return new Bounded(values[0].Value, values[0].Bound) - new Bounded(values[1].Value, values[1].Bound);
    }

    private Bounded LongRun(Generator generator, ConcreteChain chain, double[] rewards)
    {
        if (chain.Count > 25)
        {
            return Stationary(generator, [.. Enumerable.Range(0, chain.Count)], chain, rewards);
        }

        Bounded sum = 0;
        foreach (var members in new ReferenceChain(chain.Count, chain.Moves).ClosedClasses())
        {
            sum += EndsIn(generator, chain, Mask(chain, members)) * Stationary(generator, members, chain, rewards);
        }

        return sum;
    }

    private Bounded Stationary(Generator generator, int[] members, ConcreteChain chain, double[] rewards)
    {
        var part = generator;
        if (members.Length < chain.Count)
        {
            var builder = new GeneratorBuilder(members.Length);
            foreach (var (from, to, rate) in chain.Moves.Where(m => members.Contains(m.From)))
            {
                builder.Add(Array.IndexOf(members, from), Array.IndexOf(members, to), rate);
            }

            part = builder.Build();
        }

        var vector = stationary.Solve(part, SolveContext.Default);
        Bounded sum = 0;
        for (var k = 0; k < members.Length; k++)
        {
            sum += Bounded.Relative(vector.Probabilities[k] * rewards[members[k]], vector.RelativeBound);
        }

        return sum;
    }

    private Bounded EndsIn(Generator generator, ConcreteChain chain, bool[] set)
    {
        var reach = new ReferenceChain(chain.Count, chain.Moves);
        var closed = Mask(chain, [.. reach.ClosedClasses().SelectMany(c => c)]);
        Bounded inside = chain.Start.Where((_, i) => set[i]).Sum();
        return closed.All(c => c) ? inside : inside + Until(generator, chain, closed, Flow(chain, set));
    }

    private Bounded Until(Generator generator, ConcreteChain chain, bool[] end, double[] rewards)
    {
        var problem = new AbsorptionProblem { Generator = generator, Alive = Not(end), Rewards = [rewards] };
        var result = absorption.Solve(problem, SolveContext.Default);
        return Weighed(chain, result.Earnings[0], result.RelativeBound);
    }

    private Bounded Moment(Generator generator, ConcreteChain chain, bool[] end, int order)
    {
        var rewards = Ones(Not(end));
        var bound = 0.0;
        for (var k = 1; k <= order; k++)
        {
            var problem = new AbsorptionProblem { Generator = generator, Alive = Not(end), Rewards = [[.. rewards.Select(r => r * k)]] };
            var result = absorption.Solve(problem, SolveContext.Default);
            rewards = result.Earnings[0];
            bound += result.RelativeBound + 2e-16;
        }

        return Weighed(chain, rewards, bound);
    }

    /// <summary>E(T; ended in the target) / P(ended in the target), with the sojourn times weighed by the chance to end there.</summary>
    private Bounded ConditionalMean(Generator generator, ConcreteChain chain, bool[] target, bool[] alive)
    {
        var chance = absorption.Solve(
            new AbsorptionProblem { Generator = generator, Alive = alive, Rewards = [Flow(chain, target)] }, SolveContext.Default);
        var joint = absorption.Solve(
            new AbsorptionProblem { Generator = generator, Alive = alive, Rewards = [chance.Earnings[0]] }, SolveContext.Default);
        return Weighed(chain, joint.Earnings[0], joint.RelativeBound + chance.RelativeBound)
            / Weighed(chain, chance.Earnings[0], chance.RelativeBound);
    }

    private Bounded Kemeny(Generator generator, ConcreteChain chain, string from)
    {
        var start = Enumerable.Range(0, chain.Count).Select(i => chain.Names[i] == from ? 1.0 : 0).ToArray();
        Bounded sum = 0;
        for (var j = 0; j < chain.Count; j++)
        {
            var only = Mask(chain, [j]);
            sum += LongRun(generator, chain, Ones(only)) * (start[j] == 1 ? 0 : Moment(generator, chain with { Start = start }, only, 1));
        }

        return sum;
    }

    private static Bounded Weighed(ConcreteChain chain, double[] values, double relativeBound)
    {
        Bounded sum = 0;
        for (var i = 0; i < chain.Count; i++)
        {
            if (chain.Start[i] > 0)
            {
                sum += chain.Start[i] * Bounded.Relative(values[i], relativeBound);
            }
        }

        return sum;
    }
}
