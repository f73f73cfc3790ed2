using ChainSolve.Cli.Commands;
using ChainSolve.Language.Diagnostics;

namespace ChainSolve.Cli.Tests.Support;

/// <summary>Stands in for the library where a test is about what the command line makes of its answers.</summary>
internal sealed class FakeSession(Func<Work, CommandAnswer> answer) : IModelSession
{
    public string TimeUnit => "h";

    public IReadOnlyList<Diagnostic> Warnings { get; init; } = [];

    public IReadOnlyList<string> Notes { get; init; } = [];

    /// <summary>What was asked, in order.</summary>
    public List<string> Asked { get; } = [];

    public CommandAnswer Check(Work work) => Note("check", work);

    public CommandAnswer Solve(IReadOnlyList<string> measures, Work work) => Note($"solve {string.Join(' ', measures)}", work);

    public CommandAnswer Matrix(double time, Work work) => Note(FormattableString.Invariant($"matrix {time}"), work);

    public CommandAnswer Likely(double? time, int count, Work work) => Note(FormattableString.Invariant($"likely {time} {count}"), work);

    private CommandAnswer Note(string what, Work work)
    {
        Asked.Add(what.TrimEnd());
        return answer(work);
    }
}
