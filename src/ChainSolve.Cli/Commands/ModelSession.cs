using ChainSolve.Cli.Terminal;
using ChainSolve.Language.Diagnostics;
using ChainSolve.Numerics.Estimates;
using ChainSolve.Reports;

namespace ChainSolve.Cli.Commands;

/// <summary>A model as the library reads and solves it.</summary>
internal sealed class ModelSession : IModelSession
{
    private readonly Model model;
    private readonly Request request;

    private ModelSession(Model model, Request request)
    {
        (this.model, this.request) = (model, request);
        Warnings = model.Warnings;
    }

    public string TimeUnit => model.TimeUnit;

    public IReadOnlyList<Diagnostic> Warnings { get; private set; }

    public IReadOnlyList<string> Notes => model.SettingNotes;

    /// <summary>Reads a model and sets its givens.</summary>
    /// <exception cref="ModelFaultsException">The text or a setting has faults.</exception>
    public static IModelSession Open(byte[] content, Request request)
    {
        var name = request.File == "-" ? "standard input" : Path.GetFileName(request.File);
        var reading = Model.TryRead(content, name);
        if (reading.Model is { } read && request.Settings.Count > 0)
        {
            reading = read.TryWith(request.Settings.Select(s => KeyValuePair.Create(s.Name, s.Value)));
        }

        return reading.Model is { } model ? new ModelSession(model, request) : throw new ModelFaultsException(reading.Diagnostics);
    }

    public CommandAnswer Check(Work work)
    {
        var exploration = model.Explore(Options(work), work.Cancellation);
        Warnings = exploration.Warnings;
        return new CommandAnswer(ExitCodes.Done, writer => Report.Write(exploration, Format, writer));
    }

    public CommandAnswer Solve(IReadOnlyList<string> measures, Work work)
    {
        RefuseUnknown(measures);
        var solution = measures.Count == 0
            ? model.Solve(Options(work), work.Cancellation)
            : model.Solve(measures, Options(work), work.Cancellation);
        Warnings = solution.Warnings;
        var missed = solution.Measures.Where(m => m.Status != SolveStatus.Ok).Select(m => m.Name).ToList();
        var command = string.Join(' ', ["solve", .. measures.Select(m => $"--measure {m}"), .. request.Settings.Select(s => $"--set {s.Name}={s.Value}")]);
        return new CommandAnswer(
            missed.Count == 0 ? ExitCodes.Done : ExitCodes.AccuracyNotReached,
            writer => Report.Write(solution, Format, writer, command),
            missed.Count == 0 ? null : $"the accuracy wanted was not reached for {string.Join(", ", missed)}");
    }

    public CommandAnswer Matrix(double time, Work work)
    {
        var matrix = model.TransitionMatrix(time, Options(work), work.Cancellation);
        return new CommandAnswer(ExitCodes.Done, writer => Report.Write(matrix, Format, writer));
    }

    public CommandAnswer Likely(double? time, int count, Work work)
    {
        var likely = model.LikelyStates(time, count, Options(work), work.Cancellation);
        return new CommandAnswer(ExitCodes.Done, writer => Report.Write(likely, Format, writer));
    }

    private ReportFormat Format => request.Format switch
    {
        "json" => ReportFormat.Json,
        "csv" => ReportFormat.Csv,
        _ => ReportFormat.Text,
    };

    private void RefuseUnknown(IReadOnlyList<string> measures)
    {
        var known = model.Measures.Select(m => m.Name).ToArray();
        foreach (var name in measures.Where(m => !known.Contains(m)))
        {
            throw new UsageException(Suggestions.Nearest(name, known) is { } nearest
                ? $"there is no measure '{name}'; nearest: '{nearest}'"
                : $"there is no measure '{name}'; the model has: {string.Join(", ", known)}");
        }
    }

    private SolveOptions Options(Work work)
    {
        var usual = SolveOptions.Default;
        return usual with
        {
            Tolerance = request.Tolerance ?? usual.Tolerance,
            Negligible = request.Negligible ?? usual.Negligible,
            TransientMethod = request.Methods.GetValueOrDefault("transient"),
            StationaryMethod = request.Methods.GetValueOrDefault("stationary"),
            AbsorptionMethod = request.Methods.GetValueOrDefault("absorption"),
            MaxStates = request.MaxStates ?? usual.MaxStates,
            MaxMemory = request.MaxMemory ?? MemoryLimit.OfThisMachine,
            Threads = request.Threads ?? Environment.ProcessorCount,
            Progress = work.Progress,
        };
    }
}
