using System.CommandLine;
using ChainSolve.Cli.Terminal;

namespace ChainSolve.Cli.Commands;

/// <summary>All commands.</summary>
internal static class CommandTree
{
    public static RootCommand Build(ProcessStreams streams)
    {
        var runner = new ModelCommand(streams, ModelSession.Open);
        return new("Checks and solves models of equipment that fails and is restored, as continuous-time Markov chains.")
        {
            ModelCommands.Check(runner),
            ModelCommands.Solve(runner),
            ModelCommands.Matrix(runner),
            ModelCommands.Likely(runner),
            StarterCommand.Build(streams),
        };
    }
}
