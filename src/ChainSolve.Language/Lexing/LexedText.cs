using ChainSolve.Language.Diagnostics;
using Superpower.Model;

namespace ChainSolve.Language.Lexing;

/// <summary>A text as tokens.</summary>
/// <param name="Tokens">The tokens, line ends included.</param>
/// <param name="Comments">The comments, <c>#</c> included.</param>
/// <param name="Faults">What could not be read.</param>
internal sealed record LexedText(Token<TokenKind>[] Tokens, IReadOnlyList<Text.TextSpan> Comments, IReadOnlyList<Diagnostic> Faults);
