namespace ChainSolve.Expressions;

/// <summary>Expressions as one list of instructions; both back ends run it, so that they cannot differ.</summary>
/// <param name="Instructions">The steps.</param>
/// <param name="Slots">How many slots for shared expressions there are.</param>
/// <param name="Depth">How many cells the stack needs.</param>
/// <param name="Outputs">How many expressions there are.</param>
internal sealed record InstructionList(Instruction[] Instructions, int Slots, int Depth, int Outputs)
{
    public static InstructionList Of(IReadOnlyList<Expr> outputs) => new InstructionWriter(outputs).Write();
}
