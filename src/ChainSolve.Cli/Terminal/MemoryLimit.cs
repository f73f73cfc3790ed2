namespace ChainSolve.Cli.Terminal;

/// <summary>How much memory the process may take.</summary>
internal static class MemoryLimit
{
    // What the runtime and its code take besides the heap.
    private const long BesidesHeap = 90_000_000;

    /// <summary>Nine tenths of what there is for this process, in bytes.</summary>
    public static long OfThisMachine => GC.GetGCMemoryInfo().TotalAvailableMemoryBytes / 10 * 9;

    /// <summary>Holds the process to a size: beyond it, memory runs out.</summary>
    public static void Set(long bytes)
    {
        AppContext.SetData("GCHeapHardLimit", (ulong)(bytes - BesidesHeap));
        GC.RefreshMemoryLimit();
    }
}
