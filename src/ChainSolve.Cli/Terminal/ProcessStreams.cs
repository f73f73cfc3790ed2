using System.Text;

namespace ChainSolve.Cli.Terminal;

/// <summary>What a process reads and writes besides files, and what holds it. Tests give their own.</summary>
internal sealed record ProcessStreams
{
    private static readonly UTF8Encoding Utf8 = new(encoderShouldEmitUTF8Identifier: false);

    /// <summary>Opens standard input; called at most once.</summary>
    public required Func<Stream> Input { get; init; }

    /// <summary>The answer, and nothing else. UTF-8 without a byte-order mark.</summary>
    public required TextWriter Answer { get; init; }

    /// <summary>Faults, warnings and progress.</summary>
    public required TextWriter Error { get; init; }

    /// <summary>Whether someone watches the error stream on a terminal.</summary>
    public required bool ErrorIsTerminal { get; init; }

    /// <summary>Reads an environment variable; null where it is not set.</summary>
    public required Func<string, string?> Environment { get; init; }

    /// <summary>Holds the process to so many bytes; nothing where it belongs to somebody else.</summary>
    public Action<long> HoldMemory { get; init; } = _ => { };

    /// <summary>Whether the terminal can do no more than lines.</summary>
    public bool IsDumb => Environment("TERM") == "dumb";

    /// <summary>The streams of the running process.</summary>
    public static ProcessStreams OfThisProcess() => new()
    {
        Input = Console.OpenStandardInput,
        Answer = new StreamWriter(Console.OpenStandardOutput(), Utf8, 1 << 16),
        Error = new StreamWriter(Console.OpenStandardError(), Utf8) { AutoFlush = true },
        ErrorIsTerminal = !Console.IsErrorRedirected,
        Environment = System.Environment.GetEnvironmentVariable,
        HoldMemory = MemoryLimit.Set,
    };
}
