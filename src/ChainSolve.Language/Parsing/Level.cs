namespace ChainSolve.Language.Parsing;

/// <summary>The levels of operators that are read in a loop, loosest first.</summary>
internal enum Level
{
    Or,
    And,
    Sum,
    Product,
}
