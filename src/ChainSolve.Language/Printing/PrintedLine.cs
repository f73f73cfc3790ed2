namespace ChainSolve.Language.Printing;

/// <summary>A line of printed text and the part of the source that it came from.</summary>
/// <param name="Depth">How far it is indented, in steps.</param>
/// <param name="Text">The text without indentation.</param>
/// <param name="Start">Offset in the source where it starts.</param>
/// <param name="End">Offset in the source where it ends.</param>
internal readonly record struct PrintedLine(int Depth, string Text, int Start, int End);
