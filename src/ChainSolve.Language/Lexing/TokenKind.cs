namespace ChainSolve.Language.Lexing;

/// <summary>The kinds of tokens.</summary>
internal enum TokenKind
{
    End,
    LineEnd,
    Number,
    Name,
    Text,
    Percent,
    OpenBracket,
    CloseBracket,
    OpenBrace,
    CloseBrace,
    Semicolon,
    Comma,
    Colon,
    Dot,
    Range,
    Arrow,
    Equal,
    NotEqual,
    Less,
    LessOrEqual,
    Greater,
    GreaterOrEqual,
    Plus,
    Minus,
    Star,
    Slash,
    Caret,
}
