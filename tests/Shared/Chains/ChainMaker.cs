namespace ChainSolve.Tests.Shared.Chains;

/// <summary>Makes chains of many structures, with rates that may lie twelve powers of ten apart.</summary>
internal sealed class ChainMaker(Random random)
{
    /// <summary>The structures; those before <see cref="IrreducibleCount"/> are irreducible.</summary>
    public static readonly string[] Shapes =
        ["dense", "sparse", "birth-death", "ring", "blocks", "trap pair", "absorbing", "ladder", "classes", "leak", "tree"];

    public const int IrreducibleCount = 6;

    private double spread;

    public RandomChain Make(string shape, int count, double lowRateTime, double highRateTime)
    {
        spread = new[] { 0.0, 2, 6, 12 }[random.Next(4)];
        var moves = Structure(shape, count);
        var top = moves.GroupBy(m => m.From).Select(g => g.Sum(m => m.Rate)).DefaultIfEmpty(1).Max();
        return new RandomChain
        {
            Shape = shape,
            Count = count,
            Moves = moves,
            Start = Start(count),
            Time = LogUniform(lowRateTime, highRateTime) / top,
            Rewards = [.. Enumerable.Range(0, count).Select(_ => random.Next(3) == 0 ? 0 : LogUniform(1e-3, 1e3))],
        };
    }

    private List<(int From, int To, double Rate)> Structure(string shape, int n)
    {
        var moves = new Dictionary<(int, int), double>();
        void Add(int from, int to, double factor = 1)
        {
            if (from != to)
            {
                moves[(from, to)] = Rate() * factor;
            }
        }

        void Ring(int from, int length)
        {
            for (var i = 0; i < length; i++)
            {
                Add(from + i, from + ((i + 1) % length));
            }
        }

        void Extra(int from, int length, int howMany)
        {
            for (var k = 0; k < howMany; k++)
            {
                Add(from + random.Next(length), from + random.Next(length));
            }
        }

        var half = Math.Max(1, n / 2);
        switch (shape)
        {
            case "dense":
                Enumerable.Range(0, n * n).ToList().ForEach(k => Add(k / n, k % n));
                break;
            case "sparse":
                Ring(0, n);
                Extra(0, n, n);
                break;
            case "ring":
                Ring(0, n);
                break;
            case "birth-death":
                Enumerable.Range(0, n - 1).ToList().ForEach(i => { Add(i, i + 1); Add(i + 1, i); });
                break;
            case "blocks":
                Ring(0, half);
                Ring(half, n - half);
                Extra(0, half, half);
                if (n > half)
                {
                    var coupling = Math.Pow(10, -random.Next(3, 11));
                    Add(random.Next(half), half + random.Next(n - half), coupling);
                    Add(half + random.Next(n - half), random.Next(half), coupling);
                }

                break;
            case "trap pair":
                Ring(0, n);
                if (n > 2)
                {
                    moves[(0, 1)] = 1;
                    moves[(1, 0)] = 1;
                    moves[(1, 2)] = Math.Pow(10, -random.Next(6, 12));
                }

                break;
            case "absorbing":
                Extra(0, n, 3 * n);
                moves.Keys.Where(k => k.Item1 == n - 1).ToList().ForEach(k => moves.Remove(k));
                Add(random.Next(n), n - 1);
                break;
            case "ladder":
                // Failures one way, repairs back, the last state is for good.
                Enumerable.Range(0, n - 1).ToList().ForEach(i => { Add(i, i + 1, 1e-3); if (i < n - 2) { Add(i + 1, i); } });
                break;
            case "classes":
                Ring(0, half);
                Extra(0, n, half);
                moves.Keys.Where(k => k.Item1 < half && k.Item2 >= half).ToList().ForEach(k => moves.Remove(k));
                break;
            case "leak":
                Ring(0, n - 1 > 0 ? n - 1 : 1);
                Add(random.Next(n), n - 1, Math.Pow(10, -random.Next(2, 9)));
                moves.Keys.Where(k => k.Item1 == n - 1).ToList().ForEach(k => moves.Remove(k));
                break;
            default:
                Enumerable.Range(1, n - 1).ToList().ForEach(i => Add(random.Next(i), i));
                break;
        }

        return [.. moves.OrderBy(m => m.Key).Select(m => (m.Key.Item1, m.Key.Item2, m.Value))];
    }

    private double[] Start(int count)
    {
        if (random.Next(3) > 0)
        {
            var at = random.Next(count);
            return [.. Enumerable.Range(0, count).Select(i => i == at ? 1.0 : 0.0)];
        }

        // Shares of 1/64, so that they add to exactly one.
        var shares = new double[count];
        for (var k = 0; k < 64; k++)
        {
            shares[random.Next(count)] += 1.0 / 64;
        }

        return shares;
    }

    private double Rate() => LogUniform(Math.Pow(10, -spread), 1);

    private double LogUniform(double low, double high) => Math.Exp(Math.Log(low) + (random.NextDouble() * Math.Log(high / low)));
}
