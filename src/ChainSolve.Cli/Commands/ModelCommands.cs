using System.CommandLine;
using System.Globalization;

namespace ChainSolve.Cli.Commands;

/// <summary>The commands that take a model: check, solve, matrix and likely.</summary>
internal static class ModelCommands
{
    public static Command Check(ModelCommand runner)
    {
        var command = new Command("check", "Reads a model and explores its states: faults, warnings, sizes.");
        var common = CommonOptions.AddTo(command, "text", "json");
        command.SetAction((parsed, stop) => runner.RunAsync(common.Read(parsed), (session, work) => session.Check(work), stop));
        return command;
    }

    public static Command Solve(ModelCommand runner)
    {
        var command = new Command("solve", "Computes the measures of a model.");
        var common = CommonOptions.AddTo(command, "text", "json", "csv");
        var measure = CommonOptions.Repeatable("--measure", "NAME", "Computes this measure only; can be repeated.");
        command.Add(measure);
        command.SetAction((parsed, stop) =>
        {
            var names = parsed.GetValue(measure) ?? [];
            return runner.RunAsync(common.Read(parsed), (session, work) => session.Solve(names, work), stop);
        });
        return command;
    }

    public static Command Matrix(ModelCommand runner)
    {
        var command = new Command("matrix", "The transition matrix P(t) of a small chain.");
        var common = CommonOptions.AddTo(command, "text", "json", "csv");
        var at = CommonOptions.Single("--at", "TIME", "The time, for example \"10 h\".");
        at.Required = true;
        command.Add(at);
        command.SetAction((parsed, stop) =>
        {
            var time = TimeText.Parse("--at", parsed.GetRequiredValue(at));
            return runner.RunAsync(common.Read(parsed), (session, work) => session.Matrix(time.In("--at", session.TimeUnit), work), stop);
        });
        return command;
    }

    public static Command Likely(ModelCommand runner)
    {
        var command = new Command("likely", "The most likely states at a time or in the long run.");
        var common = CommonOptions.AddTo(command, "text", "json", "csv");
        var at = CommonOptions.Single("--at", "TIME", "The time, for example 100h.");
        var steady = new Option<bool>("--steady") { Description = "In the long run." };
        var count = CommonOptions.Single("--count", "N", "How many states; 10 if not given.");
        command.Add(at);
        command.Add(steady);
        command.Add(count);
        command.SetAction((parsed, stop) =>
        {
            var text = parsed.GetValue(at);
            if (parsed.GetValue(steady) == text is not null)
            {
                throw new UsageException("say when: either --at TIME or --steady");
            }

            var time = text is null ? (TimeText?)null : TimeText.Parse("--at", text);
            var shown = (int)ValueReader.Whole("--count", parsed.GetValue(count) ?? 10.ToString(CultureInfo.InvariantCulture), 1, 1_000_000);
            return runner.RunAsync(common.Read(parsed), (session, work) => session.Likely(time?.In("--at", session.TimeUnit), shown, work), stop);
        });
        return command;
    }
}
