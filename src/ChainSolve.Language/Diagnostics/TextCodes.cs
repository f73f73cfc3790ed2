namespace ChainSolve.Language.Diagnostics;

/// <summary>The codes of faults in the text of a model.</summary>
public static class TextCodes
{
    /// <summary>Bytes that are not UTF-8.</summary>
    public static readonly DiagnosticCode NotUtf8 = new("L101", "the file is not UTF-8");

    /// <summary>A file over the size limit.</summary>
    public static readonly DiagnosticCode TooLarge = new("L102", "the file is too large");

    /// <summary>Nothing to read.</summary>
    public static readonly DiagnosticCode Empty = new("L103", "the file is empty");

    /// <summary>A character that the notation does not use.</summary>
    public static readonly DiagnosticCode StrayCharacter = new("L110", "a character that has no meaning here");

    /// <summary>A number that is not written as the notation wants.</summary>
    public static readonly DiagnosticCode NumberForm = new("L111", "a number in a form that is not read");

    /// <summary>A number beyond the range of a double.</summary>
    public static readonly DiagnosticCode NumberTooLarge = new("L112", "a number that is too large");

    /// <summary>A text without its closing quote, or with an unknown escape.</summary>
    public static readonly DiagnosticCode TextForm = new("L113", "a text in quotes that is not closed or has an unknown escape");

    /// <summary>Something else was expected.</summary>
    public static readonly DiagnosticCode Unexpected = new("L120", "something else was expected");

    /// <summary>A statement word that is not known.</summary>
    public static readonly DiagnosticCode UnknownStatement = new("L121", "an unknown statement word");

    /// <summary>A bracket or brace without its partner.</summary>
    public static readonly DiagnosticCode Unclosed = new("L122", "a bracket or brace without its partner");

    /// <summary>A line that begins with what belongs to the end of the line above.</summary>
    public static readonly DiagnosticCode LineStart = new("L123", "a line that begins with an operator or joining word");

    /// <summary>Nesting beyond the limit.</summary>
    public static readonly DiagnosticCode TooDeep = new("L124", "nesting that is too deep");

    /// <summary>Comparisons in a row.</summary>
    public static readonly DiagnosticCode ChainedComparison = new("L125", "comparisons that are chained");

    /// <summary>A condition of the form <c>P is a or b</c> or <c>P is not a</c>.</summary>
    public static readonly DiagnosticCode IsForm = new("L126", "an 'is' with more than one state");

    /// <summary>A unit where none can stand, or a power behind a unit.</summary>
    public static readonly DiagnosticCode UnitForm = new("L127", "a unit that is misplaced");

    /// <summary>An <c>if</c> that needs brackets.</summary>
    public static readonly DiagnosticCode IfForm = new("L128", "an 'if' that needs brackets");

    /// <summary>A word of the notation that is reserved, used as a name.</summary>
    public static readonly DiagnosticCode ReservedWord = new("L129", "a reserved word used as a name");

    /// <summary>A part of the notation that this version does not read.</summary>
    public static readonly DiagnosticCode NotRead = new("L130", "a part of the notation that this version does not read");

    /// <summary>The further faults of a text with many.</summary>
    public static readonly DiagnosticCode TooMany = new("L199", "too many faults to tell them all");

    /// <summary>All codes, in order.</summary>
    public static IReadOnlyList<DiagnosticCode> All { get; } =
    [
        NotUtf8, TooLarge, Empty, StrayCharacter, NumberForm, NumberTooLarge, TextForm, Unexpected, UnknownStatement, Unclosed,
        LineStart, TooDeep, ChainedComparison, IsForm, UnitForm, IfForm, ReservedWord, NotRead, TooMany,
    ];
}
