using ChainSolve.Language.Diagnostics;

namespace ChainSolve.Cli.Commands;

/// <summary>A model that was read, with its givens set: what the commands ask of the library.</summary>
/// <remarks>All methods throw what the library throws: faults, limits, cancellation.</remarks>
internal interface IModelSession
{
    /// <summary>The model's unit of time; empty for a model without units.</summary>
    string TimeUnit { get; }

    /// <summary>Warnings known so far; those about states are known once a method has explored them.</summary>
    IReadOnlyList<Diagnostic> Warnings { get; }

    /// <summary>How values that were set without a unit were read, such as <c>mttr = 12 h</c>.</summary>
    IReadOnlyList<string> Notes { get; }

    /// <summary>Sizes, classes and warnings.</summary>
    CommandAnswer Check(Work work);

    /// <summary>The measures.</summary>
    /// <param name="measures">The names of those wanted; empty for all.</param>
    /// <param name="work">Progress and cancellation.</param>
    CommandAnswer Solve(IReadOnlyList<string> measures, Work work);

    /// <summary>P(t).</summary>
    /// <param name="time">The time in the model's unit.</param>
    /// <param name="work">Progress and cancellation.</param>
    CommandAnswer Matrix(double time, Work work);

    /// <summary>The most likely states.</summary>
    /// <param name="time">The time in the model's unit; null for the long run.</param>
    /// <param name="count">How many.</param>
    /// <param name="work">Progress and cancellation.</param>
    CommandAnswer Likely(double? time, int count, Work work);
}
