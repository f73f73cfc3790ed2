using ChainSolve.Cli.Commands;
using ChainSolve.Cli.Terminal;

using var signals = new SignalWatch();
return await CommandRunner.RunAsync(args, ProcessStreams.OfThisProcess(), signals);
