namespace ChainSolve.Numerics.Iteration;

/// <summary>Tries methods in their order until one gives a value.</summary>
internal static class Attempts
{
    /// <summary>The first answer, the solver that gave it, and why it was taken.</summary>
    /// <exception cref="NotConvergedException">None gave a value; the message has what each said.</exception>
    public static (TResult Result, Choice<TSolver> Choice) First<TSolver, TResult>(
        IReadOnlyList<Choice<TSolver>> choices, Func<TSolver, TResult> solve, Func<TSolver, string> nameOf)
    {
        var failures = new List<string>();
        foreach (var choice in choices)
        {
            try
            {
                var result = solve(choice.Solver);
                var why = failures.Count == 0 ? choice.Why : $"{choice.Why}; before it, {string.Join("; ", failures)}";
                return (result, choice with { Why = why });
            }
            catch (NotConvergedException failure)
            {
                failures.Add($"{nameOf(choice.Solver)} failed: {failure.Message}");
            }
        }

        throw new NotConvergedException(string.Join("; ", failures));
    }
}
