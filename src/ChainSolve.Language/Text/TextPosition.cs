namespace ChainSolve.Language.Text;

/// <summary>A place in a text as people count it.</summary>
/// <param name="Line">Line number, from 1.</param>
/// <param name="Column">Column in Unicode scalars, from 1.</param>
public readonly record struct TextPosition(int Line, int Column);
