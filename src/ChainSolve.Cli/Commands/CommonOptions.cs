using System.CommandLine;

namespace ChainSolve.Cli.Commands;

/// <summary>The options that every command on a model takes, and how they are read.</summary>
/// <remarks>All are texts for the parser: what they mean is judged here, so that messages are in our own words.</remarks>
internal sealed class CommonOptions
{
    private readonly Argument<string> file = new("FILE") { Description = "The model; - reads standard input." };
    private readonly Option<string[]> set = Repeatable("--set", "NAME=VALUE", "Gives an input another value; a bare number is read in the unit that the input was written in.");
    private readonly Option<string> tolerance = Single("--tolerance", "EPS", "Relative accuracy wanted of every value; 1e-9 if not given.");
    private readonly Option<string> negligible = Single("--negligible", "VALUE", "Values below this need no relative accuracy; 1e-290 if not given.");
    private readonly Option<string[]> method = Repeatable("--method", "JOB=NAME", "Prescribes a method: transient=NAME, stationary=NAME or absorption=NAME.");
    private readonly Option<string> threads = Single("--threads", "N", "How many threads may work; as many as there are processors if not given. Results do not depend on it.");
    private readonly Option<string> maxStates = Single("--max-states", "N", "Gives up beyond this many states.");
    private readonly Option<string> maxMemory = Single("--max-memory", "SIZE", "Gives up beyond this much memory, for example 500MB or \"4 GB\"; nine tenths of what there is if not given.");
    private readonly Option<string> timeLimit = Single("--time-limit", "TIME", "Gives up after this time, for example 30s or \"5 min\".");
    private readonly Option<string> format;
    private readonly Option<string> output = Single("--out", "PATH", "Writes the answer to a file, whole or not at all.");
    private readonly Option<bool> quiet = new("--quiet") { Description = "No progress and no warnings on the error stream." };
    private readonly Option<string> color = Single("--color", "WHEN", "Colours on the error stream: auto, always or never.");
    private readonly string[] formats;

    private CommonOptions(params string[] formats)
    {
        this.formats = formats;
        format = Single("--format", string.Join('|', formats), "The form of the answer; text if not given.");
    }

    /// <summary>Adds the model argument and the common options to a command.</summary>
    /// <param name="command">The command.</param>
    /// <param name="formats">The forms of answer that it knows, the usual one first.</param>
    public static CommonOptions AddTo(Command command, params string[] formats)
    {
        var options = new CommonOptions(formats);
        command.Add(options.file);
        foreach (var option in new Option[]
        {
            options.set, options.tolerance, options.negligible, options.method, options.threads, options.maxStates,
            options.maxMemory, options.timeLimit, options.format, options.output, options.quiet, options.color,
        })
        {
            command.Add(option);
        }

        return options;
    }

    /// <summary>An option that takes one value.</summary>
    public static Option<string> Single(string name, string valueName, string description) =>
        new(name) { HelpName = valueName, Description = description, Arity = ArgumentArity.ExactlyOne };

    /// <summary>An option that can be given several times, with one value each time.</summary>
    public static Option<string[]> Repeatable(string name, string valueName, string description) =>
        new(name) { HelpName = valueName, Description = description, Arity = ArgumentArity.OneOrMore };

    /// <summary>Reads what was given.</summary>
    /// <exception cref="UsageException">A value does not fit its option.</exception>
    public Request Read(ParseResult parsed) => new()
    {
        File = parsed.GetRequiredValue(file),
        Settings = [.. (parsed.GetValue(set) ?? []).Select(ValueReader.Setting)],
        Tolerance = parsed.GetValue(tolerance) is { } t ? ValueReader.Positive("--tolerance", t, below: 1) : null,
        Negligible = parsed.GetValue(negligible) is { } n ? ValueReader.Positive("--negligible", n, below: double.MaxValue) : null,
        Methods = ValueReader.Methods(parsed.GetValue(method) ?? []),
        Threads = parsed.GetValue(threads) is { } w ? (int)ValueReader.Whole("--threads", w, 1, 1024) : null,
        MaxStates = parsed.GetValue(maxStates) is { } m ? ValueReader.Whole("--max-states", m, 1, int.MaxValue) : null,
        MaxMemory = parsed.GetValue(maxMemory) is { } size ? ValueReader.Memory("--max-memory", size) : null,
        TimeLimit = parsed.GetValue(timeLimit) is { } limit ? ValueReader.Duration("--time-limit", limit) : null,
        TimeLimitText = parsed.GetValue(timeLimit),
        Format = parsed.GetValue(format) is { } f ? ValueReader.OneOf("--format", f, formats) : formats[0],
        Output = parsed.GetValue(output),
        IsQuiet = parsed.GetValue(quiet),
        Color = parsed.GetValue(color) is { } c ? ValueReader.OneOf("--color", c, ["auto", "always", "never"]) : "auto",
    };
}
