using System.CommandLine;
using ChainSolve.Cli.Terminal;

namespace ChainSolve.Cli.Commands;

/// <summary>All commands.</summary>
internal static class CommandTree
{
    public static RootCommand Build(ProcessStreams streams) =>
        new("Checks and solves models of equipment that fails and is restored, as continuous-time Markov chains.")
        {
            StarterCommand.Build(streams),
        };
}
