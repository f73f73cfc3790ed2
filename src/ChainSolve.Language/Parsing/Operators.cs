using ChainSolve.Language.Lexing;
using ChainSolve.Language.Syntax;
using Superpower.Model;

namespace ChainSolve.Language.Parsing;

/// <summary>Which tokens are which operators.</summary>
internal static class Operators
{
    public static ChainOperator? ChainOperatorOf(Token<TokenKind> token, Level level) => level switch
    {
        Level.Or when token.Is("or") => ChainOperator.Or,
        Level.And when token.Is("and") => ChainOperator.And,
        Level.Sum when token.Kind == TokenKind.Plus => ChainOperator.Add,
        Level.Sum when token.Kind == TokenKind.Minus => ChainOperator.Subtract,
        Level.Product when token.Kind == TokenKind.Star => ChainOperator.Multiply,
        Level.Product when token.Kind == TokenKind.Slash => ChainOperator.Divide,
        Level.Product when token.Is("per") => ChainOperator.Per,
        _ => null,
    };

    public static BinaryOperator? ComparisonOf(TokenKind kind) => kind switch
    {
        TokenKind.Equal => BinaryOperator.Equal,
        TokenKind.NotEqual => BinaryOperator.NotEqual,
        TokenKind.Less => BinaryOperator.Less,
        TokenKind.LessOrEqual => BinaryOperator.LessOrEqual,
        TokenKind.Greater => BinaryOperator.Greater,
        TokenKind.GreaterOrEqual => BinaryOperator.GreaterOrEqual,
        _ => null,
    };
}
