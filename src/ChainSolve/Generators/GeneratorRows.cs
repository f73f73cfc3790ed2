namespace ChainSolve.Generators;

/// <summary>The rows of a generator, with what was learnt while they were filled.</summary>
/// <param name="Offsets">Entries of row i stand at <c>[Offsets[i], Offsets[i + 1])</c>.</param>
/// <param name="Targets">The target of each entry, ascending within a row.</param>
/// <param name="Rates">The rate of each entry.</param>
/// <param name="Happens">Which transitions are possible in some state.</param>
internal sealed record GeneratorRows(long[] Offsets, int[] Targets, double[] Rates, bool[] Happens);
