using System.Runtime.ExceptionServices;

namespace ChainSolve.StateSpace;

/// <summary>Lets several threads work at once.</summary>
internal static class Workers
{
    /// <summary>Does something for each of the workers, on as many threads, the caller's among them.</summary>
    /// <param name="workers">The workers.</param>
    /// <param name="threads">1 to do all of it on the caller's thread.</param>
    /// <param name="work">What is done. If it throws for several, the exception of the first of them comes through, once all have ended.</param>
    public static void ForEach<T>(T[] workers, int threads, Action<T> work)
    {
        if (threads == 1)
        {
            Array.ForEach(workers, work);
            return;
        }

        var others = new Task[workers.Length - 1];
        for (var i = 0; i < others.Length; i++)
        {
            var worker = workers[i + 1];
            others[i] = Task.Run(() => work(worker));
        }

        Exception? first = null;
        try
        {
            work(workers[0]);
        }
        catch (Exception e)
        {
            first = e;
        }

        foreach (var other in others)
        {
            try
            {
                other.GetAwaiter().GetResult();
            }
            catch (Exception e)
            {
                first ??= e;
            }
        }

        if (first is not null)
        {
            ExceptionDispatchInfo.Throw(first);
        }
    }
}
