using BenchmarkDotNet.Running;
using ChainSolve.Benchmarks.Jobs;

switch (args)
{
    case ["steps", var file, var threads, var near, var far]:
        StepTimer.Run(file, int.Parse(threads), near, far);
        break;
    case ["sweep", var file, var measure, var given, .. var values]:
        SweepTimer.Run(file, measure, given, values);
        break;
    default:
        BenchmarkSwitcher.FromAssembly(typeof(Program).Assembly).Run(args);
        break;
}
