using System.Collections;

namespace ChainSolve;

/// <summary>The results of measures, in the order of the model and by name. Immutable; safe to share between threads.</summary>
public sealed class MeasureResults : IReadOnlyList<MeasureResult>
{
    private readonly MeasureResult[] results;

    internal MeasureResults(IEnumerable<MeasureResult> results) => this.results = [.. results];

    /// <summary>The number of measures that were solved.</summary>
    public int Count => results.Length;

    /// <summary>The result of the measure at a position.</summary>
    public MeasureResult this[int index] => results[index];

    /// <summary>The result of the measure of a name.</summary>
    /// <exception cref="KeyNotFoundException">No measure of that name was solved.</exception>
    public MeasureResult this[string name] => Array.Find(results, r => r.Name == name)
        ?? throw new KeyNotFoundException($"There is no result of a measure '{name}'; there are {string.Join(", ", results.Select(r => r.Name))}.");

    /// <inheritdoc/>
    public IEnumerator<MeasureResult> GetEnumerator() => ((IEnumerable<MeasureResult>)results).GetEnumerator();

    /// <inheritdoc/>
    IEnumerator IEnumerable.GetEnumerator() => GetEnumerator();
}
