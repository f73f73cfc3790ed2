using ChainSolve.Language.Diagnostics;
using ChainSolve.Language.Lexing;
using ChainSolve.Language.Syntax;
using Superpower.Model;

namespace ChainSolve.Language.Parsing;

/// <summary>How a measure of one kind is written.</summary>
/// <param name="Word">Its first word.</param>
/// <param name="Kind">What it computes.</param>
/// <param name="LinkWords">The words between the first word, or the share of a quantile, and the subject.</param>
/// <param name="Scopes">How it may relate to time.</param>
internal sealed record MeasureForm(string Word, MeasureKind Kind, IReadOnlyList<string> LinkWords, IReadOnlyList<MeasureScope> Scopes)
{
    private static readonly MeasureForm[] All =
    [
        new("probability", MeasureKind.Probability, [], [MeasureScope.At, MeasureScope.Steady]),
        new("expected", MeasureKind.Expected, [], [MeasureScope.At, MeasureScope.Steady]),
        new("average", MeasureKind.Average, [], [MeasureScope.Over, MeasureScope.Steady]),
        new("total", MeasureKind.Total, [], [MeasureScope.Over, MeasureScope.Until]),
        new("reliability", MeasureKind.Reliability, [], [MeasureScope.Over]),
        new("onset", MeasureKind.Onset, [], [MeasureScope.Over]),
        new("entries", MeasureKind.Entries, [], [MeasureScope.At, MeasureScope.Over, MeasureScope.Steady]),
        new("mean", MeasureKind.MeanTime, ["time", "to"], [MeasureScope.None]),
        new("mean", MeasureKind.MeanSpell, ["spell"], [MeasureScope.Steady]),
        new("deviation", MeasureKind.DeviationTime, ["time", "to"], [MeasureScope.None]),
        new("quantile", MeasureKind.QuantileTime, ["time", "to"], [MeasureScope.None]),
    ];

    public static IEnumerable<string> FirstWords => All.Select(f => f.Word).Distinct();

    /// <summary>The scopes as a message shows them.</summary>
    public string ScopesShown => string.Join(" or ", Scopes.Select(s => s switch
    {
        MeasureScope.At => "'at TIMES'",
        MeasureScope.Over => "'over TIMES'",
        MeasureScope.Until => "'until CONDITION'",
        _ => "'steady'",
    }));

    public static MeasureForm? Of(string word, bool isSpell) =>
        Array.Find(All, f => f.Word == word && (f.Kind == MeasureKind.MeanSpell) == (isSpell && word == "mean"));

    public static string WordOf(MeasureScope scope) => scope switch
    {
        MeasureScope.At => "at",
        MeasureScope.Over => "over",
        MeasureScope.Steady => "steady",
        MeasureScope.Until => "until",
        _ => "",
    };

    /// <summary>Refuses the measures that this version does not read.</summary>
    public static void RefuseLater(Token<TokenKind> first, Token<TokenKind>? second)
    {
        var later = first.Is("chance") ? "chance total"
            : first.Is("deviation") && second?.Is("total") == true ? "deviation total"
            : first.Is("average") && second?.Is("entries") == true ? "average entries"
            : null;
        if (later is not null)
        {
            throw new SyntaxFaultException(TextCodes.NotRead, first.Place(), $"the measure '{later}' is not read by this version");
        }
    }

    /// <summary>Refuses the endings of measures that this version does not read.</summary>
    public static void RefuseLaterScope(Token<TokenKind>? next)
    {
        if (next is { } word && (word.Is("from") || word.Is("graded")))
        {
            throw new SyntaxFaultException(TextCodes.NotRead, word.Place(), $"'{word.Words()}' behind a measure is not read by this version");
        }
    }
}
