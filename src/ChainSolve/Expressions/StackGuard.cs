using System.Runtime.CompilerServices;
using System.Runtime.ExceptionServices;

namespace ChainSolve.Expressions;

/// <summary>Lets a deep recursion go on where the stack runs short.</summary>
internal static class StackGuard
{
    private const int FreshStackBytes = 16 * 1024 * 1024;

    public static bool IsShort => !RuntimeHelpers.TryEnsureSufficientExecutionStack();

    /// <summary>Runs a step on the stack of a fresh thread and waits for it.</summary>
    public static T OnFreshStack<T>(Func<T> step)
    {
        T result = default!;
        ExceptionDispatchInfo? failure = null;
        var thread = new Thread(
            () =>
            {
                try
                {
                    result = step();
                }
#pragma warning disable CA1031 // Handed on to the waiting thread below, whatever it is.
                catch (Exception e)
#pragma warning restore CA1031
                {
                    failure = ExceptionDispatchInfo.Capture(e);
                }
            },
            FreshStackBytes);
        thread.Start();
        thread.Join();
        failure?.Throw();
        return result;
    }
}
