using System.Diagnostics;
using ChainSolve.Generators;
using ChainSolve.Language.Diagnostics;
using ChainSolve.Language.Text;
using ChainSolve.Measures;
using ChainSolve.Modelling;
using ChainSolve.Numerics.Structure;

namespace ChainSolve;

/// <summary>Exploring and solving.</summary>
public sealed partial class Model
{
    /// <summary>Solves all measures.</summary>
    /// <param name="options">Accuracy, methods, limits and progress; null for the default.</param>
    /// <param name="cancellation">Stops the call with <see cref="OperationCanceledException"/>.</param>
    /// <remarks>
    /// A measure that could not be solved, or not as accurately as wanted, says so in its status; the others have their values.
    /// The states are explored in the first call and kept for later ones.
    /// </remarks>
    /// <exception cref="ModelFaultsException">The model asks for nothing, or a rate or reward has no value in some state.</exception>
    /// <exception cref="LimitExceededException">A limit was hit.</exception>
    /// <exception cref="OperationCanceledException">The token was cancelled.</exception>
    public Solution Solve(SolveOptions? options = null, CancellationToken cancellation = default)
    {
        if (bound.Measures.Count == 0)
        {
            throw Fault(NumericCodes.NoMeasures.Code, "the model asks for nothing; write a measure, such as: measure available = probability pump is up steady", new TextSpan(0, 0));
        }

        return Solve(bound.Measures, options, cancellation);
    }

    /// <summary>Solves some measures.</summary>
    /// <param name="measures">Their names, in any order; at least one.</param>
    /// <param name="options">As for all measures.</param>
    /// <param name="cancellation">As for all measures.</param>
    /// <exception cref="ArgumentException">There is no measure of a name.</exception>
    /// <exception cref="ModelFaultsException">A rate or reward has no value in some state.</exception>
    /// <exception cref="LimitExceededException">A limit was hit.</exception>
    /// <exception cref="OperationCanceledException">The token was cancelled.</exception>
    public Solution Solve(IReadOnlyList<string> measures, SolveOptions? options = null, CancellationToken cancellation = default)
    {
        ArgumentNullException.ThrowIfNull(measures);
        if (measures.Count == 0)
        {
            throw new ArgumentException("Name at least one measure.", nameof(measures));
        }

        foreach (var name in measures)
        {
            if (!bound.Measures.Any(m => m.Name == name))
            {
                var known = bound.Measures.Select(m => m.Name).ToArray();
                var hint = Suggestions.Nearest(name, known) is { } nearest ? $"nearest: '{nearest}'" : $"there are {string.Join(", ", known)}";
                throw new ArgumentException($"There is no measure '{name}'; {hint}.", nameof(measures));
            }
        }

        return Solve([.. bound.Measures.Where(m => measures.Contains(m.Name))], options, cancellation);
    }

    /// <summary>Solves one measure.</summary>
    /// <param name="measure">Its name.</param>
    /// <param name="options">As for all measures.</param>
    /// <param name="cancellation">As for all measures.</param>
    /// <exception cref="ArgumentException">There is no measure of that name.</exception>
    /// <exception cref="ModelFaultsException">A rate or reward has no value in some state.</exception>
    /// <exception cref="LimitExceededException">A limit was hit.</exception>
    /// <exception cref="OperationCanceledException">The token was cancelled.</exception>
    public MeasureResult Solve(string measure, SolveOptions? options = null, CancellationToken cancellation = default) =>
        Solve([measure], options, cancellation).Measures[0];

    /// <summary>Explores the states that can be reached, and tells how many there are and how they hang together.</summary>
    /// <param name="options">Limits and progress; null for the default.</param>
    /// <param name="cancellation">Stops the call with <see cref="OperationCanceledException"/>.</param>
    /// <exception cref="ModelFaultsException">A rate has no value in some state, or a counter leaves its range.</exception>
    /// <exception cref="LimitExceededException">A limit was hit.</exception>
    /// <exception cref="OperationCanceledException">The token was cancelled.</exception>
    public Exploration Explore(SolveOptions? options = null, CancellationToken cancellation = default)
    {
        var clock = Stopwatch.GetTimestamp();
        return Call(options, (chain, _, token) => Describe(chain, clock, token), cancellation);
    }

    private Exploration Describe(Chain chain, long clock, CancellationToken cancellation)
    {
        var classes = ChainClasses.Of(chain.Generator, null, cancellation);
        return new Exploration
        {
            Model = this,
            StateCount = chain.Generator.StateCount,
            TransitionCount = chain.Generator.TransitionCount,
            RecurrentClassCount = classes.Recurrent.Count,
            TransientStateCount = classes.Transient.Length,
            AbsorbingStateCount = classes.Absorbing.Count(),
            LargestExitRate = chain.Generator.MaxExitRate,
            Warnings = [.. bound.Warnings, .. chain.Warnings],
            Elapsed = Stopwatch.GetElapsedTime(clock),
        };
    }

    private Solution Solve(IReadOnlyList<BoundMeasure> measures, SolveOptions? options, CancellationToken cancellation)
    {
        var clock = Stopwatch.GetTimestamp();
        var asks = MeasureAsks.Of(bound, measures, givens);
        return Call(options, (chain, used, token) =>
        {
            var context = new MeasureContext(chain, used, token);
            var results = MeasurePlan.Of(asks, context).Run(context);
            return new Solution
            {
                Model = this,
                Measures = new MeasureResults(results.Select(r => r.Result)),
                StateCount = chain.Generator.StateCount,
                TransitionCount = chain.Generator.TransitionCount,
                Warnings = [.. bound.Warnings, .. chain.Warnings, .. results.SelectMany(r => r.Answer.Warnings)],
                Elapsed = Stopwatch.GetElapsedTime(clock),
            };
        }, cancellation);
    }

    private T Call<T>(SolveOptions? options, Func<Chain, SolveOptions, CancellationToken, T> call, CancellationToken cancellation)
    {
        var used = options ?? SolveOptions.Default;
        used.Check();
        return LimitedCall.Run(used, token => call(chains.Get(givens, used, token), used, token), cancellation);
    }

    private ModelFaultsException Fault(string code, string message, TextSpan span) =>
        new([new Diagnostic(code, Severity.Fault, message, span, bound.Source)]);
}
