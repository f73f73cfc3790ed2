namespace ChainSolve.Language.Diagnostics;

/// <summary>A stable code with its short title, as the page of faults lists it.</summary>
/// <param name="Code">The code, such as <c>L101</c>.</param>
/// <param name="Title">What it is about, in a few words.</param>
public sealed record DiagnosticCode(string Code, string Title);
