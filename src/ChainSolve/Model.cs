using System.Security.Cryptography;
using System.Text;
using ChainSolve.Binding;
using ChainSolve.Language.Diagnostics;
using ChainSolve.Measures;
using ChainSolve.Modelling;

namespace ChainSolve;

/// <summary>
/// A model that was read from text, with values for its givens: the way in for programs that solve models.
/// </summary>
/// <remarks>
/// Immutable; safe to share between threads. Models that come from one another by other values of givens share what was
/// explored: only rates are computed anew, unless a given shapes the states. Times and results are in <see cref="TimeUnit"/>.
/// </remarks>
/// <example>
/// <code>
/// var model = Model.Load("pumps.chain");
/// foreach (var hours in new[] { 4.0, 8, 16 })
/// {
///     var result = model.With("repair", hours).Solve("cold_share");
///     Console.WriteLine($"{hours} h: {result.Value} ± {result.ErrorBound}");
/// }
/// </code>
/// </example>
public sealed partial class Model
{
    private readonly BoundModel bound;
    private readonly GivenValues givens;
    private readonly ChainHolder chains;
    private readonly IReadOnlyList<GivenSetting> settings;

    internal Model(BoundModel bound, GivenValues givens, ChainHolder chains, IReadOnlyList<GivenSetting> settings, IReadOnlyList<string> settingNotes)
    {
        SettingNotes = settingNotes;
        (this.bound, this.givens, this.chains, this.settings) = (bound, givens, chains, settings);
        Givens = [.. bound.Givens.Select((g, i) => GivenView.Of(g, givens[i], bound.TimeBase))];
        Measures = [.. bound.Measures.Select(m => new MeasureInfo(m.Name, MeasureWords.Of(m.Kind), m.Sentence, m.Unit, m.Times.Count > 0))];
    }

    /// <summary>The name under which the text was read, usually that of its file.</summary>
    public string Name => bound.Source.Name;

    /// <summary>The title behind the word <c>model</c>; null where there is none.</summary>
    public string? Title => bound.Title;

    /// <summary>The unit of times and results; empty for a model without units.</summary>
    public string TimeUnit => bound.TimeBase.Unit;

    /// <summary>The inputs with their values, in the order of the text.</summary>
    public IReadOnlyList<GivenInfo> Givens { get; }

    /// <summary>For each value that was set without a unit how it was read, such as <c>mttr = 12 h</c>.</summary>
    public IReadOnlyList<string> SettingNotes { get; }

    /// <summary>What the model asks for, in the order of the text.</summary>
    public IReadOnlyList<MeasureInfo> Measures { get; }

    /// <summary>Warnings about the text. Those about states and the calculation come with the results of exploring and solving.</summary>
    public IReadOnlyList<Diagnostic> Warnings => bound.Warnings;

    /// <summary>The SHA-256 of the text in hexadecimal digits, by which records tell models apart.</summary>
    public string Fingerprint => Convert.ToHexStringLower(SHA256.HashData(Encoding.UTF8.GetBytes(bound.Source.Content)));
}
