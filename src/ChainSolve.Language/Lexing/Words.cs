using System.Collections.Frozen;

namespace ChainSolve.Language.Lexing;

/// <summary>The words of the notation that steer how lines and names are read.</summary>
internal static class Words
{
    public static readonly FrozenSet<string> Reserved = new[]
    {
        "if", "then", "else", "and", "or", "not", "per", "is", "at", "over", "until", "steady", "when", "while", "by",
    }.ToFrozenSet();

    /// <summary>Words that start a statement where they stand first on a line at depth 0.</summary>
    public static readonly FrozenSet<string> Statements = new[]
    {
        "model", "timebase", "given", "let", "crew", "item", "counter", "event", "reward", "measure",
        "phase", "phases", "test", "group", "common", "result", "require", "study",
    }.ToFrozenSet();

    /// <summary>Statement words that this version does not read.</summary>
    public static readonly FrozenSet<string> LaterStatements = new[]
    {
        "phase", "phases", "test", "group", "common", "result", "require", "study",
    }.ToFrozenSet();

    /// <summary>Words behind which a line end does not count.</summary>
    public static readonly FrozenSet<string> Joining = new[]
    {
        "and", "or", "not", "per", "at", "over", "until", "when", "while", "by", "if", "then", "else", "in", "is", "to",
    }.ToFrozenSet();

    /// <summary>Words that cannot begin a line.</summary>
    public static readonly FrozenSet<string> NeverFirst = new[]
    {
        "when", "by", "while", "at", "over", "until", "then", "else", "named", "and", "or", "per", "is",
    }.ToFrozenSet();

    /// <summary>Whether a line end behind a token of this kind does not count.</summary>
    public static bool IsJoining(TokenKind kind) => kind is TokenKind.Comma or TokenKind.Arrow or TokenKind.Range or TokenKind.Colon
        or TokenKind.Equal or TokenKind.NotEqual or TokenKind.Less or TokenKind.LessOrEqual or TokenKind.Greater or TokenKind.GreaterOrEqual
        or TokenKind.Plus or TokenKind.Minus or TokenKind.Star or TokenKind.Slash or TokenKind.Caret;

    /// <summary>Whether a token of this kind cannot begin a line.</summary>
    public static bool IsNeverFirst(TokenKind kind) => IsJoining(kind) && kind is not TokenKind.Comma;
}
