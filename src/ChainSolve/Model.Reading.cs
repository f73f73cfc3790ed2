using ChainSolve.Binding;
using ChainSolve.Generators;
using ChainSolve.Language.Parsing;
using ChainSolve.Language.Text;
using ChainSolve.Modelling;

namespace ChainSolve;

/// <summary>Reading models and setting their givens.</summary>
public sealed partial class Model
{
    /// <summary>Reads a model from a file.</summary>
    /// <param name="path">The file, UTF-8, of at most 8 MiB.</param>
    /// <exception cref="ModelFaultsException">The text has faults; all of them are told, to about twenty.</exception>
    /// <exception cref="IOException">The file cannot be read.</exception>
    /// <exception cref="UnauthorizedAccessException">The file may not be read.</exception>
    public static Model Load(string path) => OrThrow(TryLoad(path));

    /// <summary>Reads a model from a text.</summary>
    /// <param name="text">The text.</param>
    /// <param name="name">The name shown in messages.</param>
    /// <exception cref="ModelFaultsException">The text has faults; all of them are told, to about twenty.</exception>
    public static Model Parse(string text, string name = "model") => OrThrow(TryParse(text, name));

    /// <summary>Reads a model from a file; faults of the text are data, not exceptions.</summary>
    /// <param name="path">The file, UTF-8, of at most 8 MiB.</param>
    /// <exception cref="IOException">The file cannot be read.</exception>
    /// <exception cref="UnauthorizedAccessException">The file may not be read.</exception>
    public static ModelReading TryLoad(string path)
    {
        ArgumentNullException.ThrowIfNull(path);
        using var file = File.OpenRead(path);

        // One byte over the limit is enough to see that the file is too large.
        var bytes = new byte[Math.Min(file.Length, SourceReader.LargestSize + 1L)];
        file.ReadExactly(bytes);
        return TryRead(bytes, Path.GetFileName(path));
    }

    /// <summary>Reads a model from the bytes of a file; faults of the text are data, not exceptions.</summary>
    /// <param name="bytes">UTF-8, at most 8 MiB.</param>
    /// <param name="name">The name shown in messages.</param>
    public static ModelReading TryRead(ReadOnlySpan<byte> bytes, string name)
    {
        var reading = SourceReader.FromBytes(name, bytes);
        return reading.Text is { } text ? Read(text) : new ModelReading(null, [reading.Fault!]);
    }

    /// <summary>Reads a model from a text; faults are data, not exceptions.</summary>
    /// <param name="text">The text.</param>
    /// <param name="name">The name shown in messages.</param>
    public static ModelReading TryParse(string text, string name = "model")
    {
        ArgumentNullException.ThrowIfNull(text);
        return Read(new SourceText(name, text));
    }

    /// <summary>The same model with another value of a given.</summary>
    /// <param name="given">The name of the given.</param>
    /// <param name="value">The value, in the unit in which the given was written (<see cref="GivenInfo.Unit"/>).</param>
    /// <remarks>Givens that follow this one take their values anew. Nothing is computed yet.</remarks>
    /// <exception cref="ModelFaultsException">There is no such given, or the value is not admissible.</exception>
    public Model With(string given, double value) => OrThrow(Set([GivenSetting.Of(given, value)]));

    /// <summary>The same model with another value of a given, as text: <c>12 h</c>, <c>3e-4 per h</c>, <c>1/20 d</c>.</summary>
    /// <param name="given">The name of the given.</param>
    /// <param name="value">The value; a number without a unit is read in the unit in which the given was written.</param>
    /// <exception cref="ModelFaultsException">There is no such given, or the value cannot be read or is not admissible.</exception>
    public Model With(string given, string value) => OrThrow(Set([GivenSetting.Of(given, value)]));

    /// <summary>The same model with other values of some givens, as text; faults are data, not exceptions.</summary>
    /// <param name="values">Pairs of a given and its value, each given once at most.</param>
    public ModelReading TryWith(IEnumerable<KeyValuePair<string, string>> values) =>
        Set([.. values.Select(v => GivenSetting.Of(v.Key, v.Value))]);

    private static ModelReading Read(SourceText source)
    {
        var parsed = ModelParser.Parse(source);
        var bound = Binder.Bind(parsed.Model);
        var diagnostics = parsed.Diagnostics.Concat(bound.Diagnostics).OrderBy(d => d.Span.Start).ToList();
        if (bound.Model is not { } model)
        {
            return new ModelReading(null, diagnostics);
        }

        var givens = new GivenResolver(model).Defaults();
        return givens.Values is { } values
            ? new ModelReading(new Model(model, values, new ChainHolder(Build(model)), [], []), diagnostics)
            : new ModelReading(null, [.. diagnostics, .. givens.Faults]);
    }

    private static Func<Chain?, GivenValues, SolveOptions, CancellationToken, Chain> Build(BoundModel model) => (last, givens, options, cancellation) =>
    {
        var explore = new ExploreOptions { MaxStates = options.MaxStates, MaxMemory = options.MaxMemory ?? long.MaxValue };
        var context = options.Context(cancellation);
        return last is ExploredChain explored
            ? ChainBuilder.Rebuild(explored, givens, explore, context)
            : ChainBuilder.Build(model, givens, explore, context);
    };

    private static Model OrThrow(ModelReading reading) => reading.Model ?? throw new ModelFaultsException(reading.Diagnostics);

    private ModelReading Set(IReadOnlyList<GivenSetting> added)
    {
        var kept = settings.Where(s => added.All(a => a.Name != s.Name));
        GivenSetting[] all = [.. kept, .. added];
        var resolved = new GivenResolver(bound).Resolve(all);
        return resolved.Values is { } values
            ? new ModelReading(new Model(bound, values, chains, all, resolved.Echoes), [])
            : new ModelReading(null, resolved.Faults);
    }
}
