using System.Runtime.CompilerServices;

namespace ChainSolve.Expressions;

/// <summary>Makes expressions ready to be evaluated.</summary>
internal static class ExprCompiler
{
    /// <summary>The most instructions of a compiled method: the just-in-time compiler takes more than linear time on very long ones.</summary>
    public const int LongestMethod = 50_000;

    /// <summary>One program for some expressions. Cost: linear in the size of their graph.</summary>
    public static IExprProgram Compile(IReadOnlyList<Expr> outputs, ExprBackEnd backEnd = ExprBackEnd.Fastest)
    {
        var list = InstructionList.Of(outputs);
        return backEnd switch
        {
            ExprBackEnd.Compiled => CompiledProgram.Of(list),
            ExprBackEnd.Fastest when RuntimeFeature.IsDynamicCodeCompiled && list.Instructions.Length <= LongestMethod => new GrowingProgram(list),
            _ => new InterpretedProgram(list),
        };
    }
}
