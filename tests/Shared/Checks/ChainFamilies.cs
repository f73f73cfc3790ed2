using System.Globalization;

namespace ChainSolve.Tests.Shared.Checks;

/// <summary>Writes out the chains that the files of checks give by a rule.</summary>
internal static class ChainFamilies
{
    public static ConcreteChain Expand(CheckChain chain) => chain.Family switch
    {
        "birth-death" => BirthDeath(chain.Levels, _ => chain.Birth, i => chain.Death * Math.Min(i, Math.Max(1, chain.Servers))),
        "erlang-loss" => BirthDeath(chain.Servers, _ => chain.Traffic, i => i),
        "machine-repair" => BirthDeath(chain.Units, i => (chain.Units - i) * chain.Failure, i => Math.Min(i, chain.Crews) * chain.Repair),
        "ehrenfest" => BirthDeath(chain.Units, i => (chain.Units - i) * chain.Rate, i => i * chain.Rate),
        "independent-units" => IndependentUnits(chain.Failures!, chain.Repairs!),
        "closed-network" => ClosedNetwork(chain.Mu!, chain.Routing!, chain.Customers),
        "erlang-service" => ErlangService(chain.Levels, chain.Arrival, chain.StageRate),
        _ => throw new InvalidDataException($"There is no family '{chain.Family}'."),
    };

    private static ConcreteChain Make(IReadOnlyList<string> names, IReadOnlyList<int> levels, List<(int, int, double)> moves) =>
        new() { Names = names, Levels = levels, Moves = moves, Start = new double[names.Count] };

    private static string Name(int number) => number.ToString(CultureInfo.InvariantCulture);

    private static ConcreteChain BirthDeath(int top, Func<int, double> birth, Func<int, double> death)
    {
        var moves = new List<(int, int, double)>();
        for (var i = 0; i < top; i++)
        {
            moves.Add((i, i + 1, birth(i)));
            moves.Add((i + 1, i, death(i + 1)));
        }

        return Make([.. Enumerable.Range(0, top + 1).Select(Name)], [.. Enumerable.Range(0, top + 1)], moves);
    }

    /// <summary>A bit of the state's number is set while that unit is down; the level counts the units that are up.</summary>
    private static ConcreteChain IndependentUnits(double[] failures, double[] repairs)
    {
        var count = 1 << failures.Length;
        var moves = new List<(int, int, double)>();
        for (var state = 0; state < count; state++)
        {
            for (var unit = 0; unit < failures.Length; unit++)
            {
                var down = (state >> unit) & 1;
                moves.Add((state, state ^ (1 << unit), down == 1 ? repairs[unit] : failures[unit]));
            }
        }

        return Make(
            [.. Enumerable.Range(0, count).Select(Name)],
            [.. Enumerable.Range(0, count).Select(s => failures.Length - int.PopCount(s))],
            moves);
    }

    /// <summary>Single servers with a fixed number of customers between three stations; the level is the queue at the first.</summary>
    private static ConcreteChain ClosedNetwork(double[] mu, double[][] routing, int customers)
    {
        var states = new List<int[]>();
        for (var first = 0; first <= customers; first++)
        {
            for (var second = 0; second <= customers - first; second++)
            {
                states.Add([first, second, customers - first - second]);
            }
        }

        var names = states.Select(s => string.Join(',', s)).ToList();
        var moves = new List<(int, int, double)>();
        foreach (var (state, at) in states.Select((s, i) => (s, i)))
        {
            for (var from = 0; from < mu.Length; from++)
            {
                for (var to = 0; to < mu.Length; to++)
                {
                    if (state[from] > 0 && routing[from][to] > 0)
                    {
                        var next = (int[])state.Clone();
                        next[from]--;
                        next[to]++;
                        moves.Add((at, names.IndexOf(string.Join(',', next)), mu[from] * routing[from][to]));
                    }
                }
            }
        }

        return Make(names, [.. states.Select(s => s[0])], moves);
    }

    /// <summary>One server whose service has two exponential stages; state 0 is empty, 2n - 1 and 2n hold n customers.</summary>
    private static ConcreteChain ErlangService(int top, double arrival, double stageRate)
    {
        var moves = new List<(int, int, double)>();
        for (var n = 0; n <= top; n++)
        {
            foreach (var state in n == 0 ? [0] : new[] { (2 * n) - 1, 2 * n })
            {
                if (n < top)
                {
                    moves.Add((state, n == 0 ? 1 : state + 2, arrival));
                }
            }

            if (n > 0)
            {
                moves.Add(((2 * n) - 1, 2 * n, stageRate));
                moves.Add((2 * n, n == 1 ? 0 : (2 * n) - 3, stageRate));
            }
        }

        return Make([.. Enumerable.Range(0, (2 * top) + 1).Select(Name)], [.. Enumerable.Range(0, (2 * top) + 1).Select(s => (s + 1) / 2)], moves);
    }
}
