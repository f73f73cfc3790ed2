using ChainSolve.Cli.Commands;
using ChainSolve.Cli.Terminal;

using var signals = new SignalWatch();
var streams = ProcessStreams.OfThisProcess();
return await CommandRunner.RunAsync(CommandTree.Build(streams), args, streams, signals);
