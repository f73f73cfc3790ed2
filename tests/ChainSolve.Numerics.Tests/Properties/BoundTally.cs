using System.Globalization;
using System.Text;
using ChainSolve.Tests.Shared.Chains;
using ChainSolve.Tests.Shared.Reference;

namespace ChainSolve.Numerics.Tests.Properties;

/// <summary>Compares values and their bounds with the reference, and sums up how wide the bounds are.</summary>
internal sealed class BoundTally
{
    /// <summary>Below this, values need not be told from zero: the default of <c>Negligible</c>.</summary>
    private const double Negligible = 1e-290;

    /// <summary>The reference has 77 digits and loses some of them in long times; an exact value comes with bound zero.</summary>
    private const double ReferenceRounding = 1e-50;

    private readonly Dictionary<string, (List<double> Ratios, List<double> Widths, List<double> Errors)> groups = new(StringComparer.Ordinal);
    private readonly List<string> failures = [];

    public int Count { get; private set; }

    /// <summary>Takes one value.</summary>
    public void Add(string group, RandomChain chain, string what, double value, double bound, BigFloat truth)
    {
        Count++;
        if (truth.IsZero)
        {
            if (value != 0 || bound != 0)
            {
                failures.Add($"{group}, {what}: zero by structure, got {value:R} with bound {bound:R}{chain}");
            }

            return;
        }

        var isNumber = double.IsFinite(value) && bound >= 0;
        var error = isNumber ? (value - truth).Abs : BigFloat.One;
        var isSeen = error > Negligible && error > truth.Abs * ReferenceRounding;
        if (!isNumber || (error > bound && isSeen))
        {
            failures.Add(string.Create(
                CultureInfo.InvariantCulture,
                $"{group}, {what}: {value:R} with bound {bound:G3}, true {truth}, error {error}{chain}"));
            return;
        }

        if (truth.Abs < Negligible)
        {
            return;
        }

        if (!groups.TryGetValue(group, out var lists))
        {
            groups[group] = lists = ([], [], []);
        }

        lists.Widths.Add(bound / truth.Abs.ToDouble());
        lists.Errors.Add((error / truth.Abs).ToDouble());
        if (isSeen)
        {
            lists.Ratios.Add((bound / error).ToDouble());
        }
    }

    /// <summary>The ratio of bound to true error, and both relative to the value, as quantiles a group.</summary>
    public string Summary()
    {
        var text = new StringBuilder("group: values; bound / true error: 1 %, median, 99 %; relative bound: median, largest; relative error: median, largest\n");
        foreach (var (group, lists) in groups.OrderBy(g => g.Key, StringComparer.Ordinal))
        {
            text.Append(CultureInfo.InvariantCulture, $"{group}: {lists.Widths.Count}; ")
                .Append(CultureInfo.InvariantCulture, $"{At(lists.Ratios, 0.01):G3}, {At(lists.Ratios, 0.5):G3}, {At(lists.Ratios, 0.99):G3}; ")
                .Append(CultureInfo.InvariantCulture, $"{At(lists.Widths, 0.5):G2}, {At(lists.Widths, 1):G2}; ")
                .Append(CultureInfo.InvariantCulture, $"{At(lists.Errors, 0.5):G2}, {At(lists.Errors, 1):G2}\n");
        }

        return text.ToString();
    }

    /// <summary>Fails if any value was outside its bound; shows a few of the smallest chains.</summary>
    public void HoldsEverywhere(int atLeast)
    {
        Assert.True(failures.Count == 0, $"{failures.Count} of {Count} values failed:\n" + string.Join('\n', failures.OrderBy(f => f.Length).Take(3)));
        Assert.True(Count >= atLeast, $"Only {Count} values were compared.");
    }

    private static double At(List<double> values, double share)
    {
        if (values.Count == 0)
        {
            return double.NaN;
        }

        values.Sort();
        return values[(int)(share * (values.Count - 1))];
    }
}
