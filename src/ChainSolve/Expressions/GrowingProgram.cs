namespace ChainSolve.Expressions;

/// <summary>Interprets its instructions until it has run so often that compiling them pays.</summary>
internal sealed class GrowingProgram(InstructionList list) : IExprProgram
{
    // Compiling takes tens of milliseconds where it is the first time in a process, and then one or so.
    private const int RunsUntilCompiled = 5_000;

    private readonly InterpretedProgram interpreted = new(list);
    private volatile CompiledProgram? compiled;
    private int runs;

    public int OutputCount => list.Outputs;

    public void Run(ReadOnlySpan<int> marking, ReadOnlySpan<double> givens, Span<double> outputs)
    {
        if (compiled is { } program)
        {
            program.Run(marking, givens, outputs);
            return;
        }

        // Threads that share the program may lose a count, or compile it twice; both give the same digits.
        interpreted.Run(marking, givens, outputs);
        if (++runs >= RunsUntilCompiled)
        {
            compiled = CompiledProgram.Of(list);
        }
    }
}
