using System.Reflection.Emit;
using System.Runtime.InteropServices;

namespace ChainSolve.Expressions;

/// <summary>Runs instructions as a method made from them, which is collected with the program.</summary>
internal sealed class CompiledProgram : IExprProgram
{
    private readonly Body body;

    private CompiledProgram(Body body, int outputCount)
    {
        this.body = body;
        OutputCount = outputCount;
    }

    private delegate void Body(ref int marking, ref double givens, ref double outputs);

    public int OutputCount { get; }

    public static CompiledProgram Of(InstructionList list)
    {
        var method = new DynamicMethod(
            "Evaluate", typeof(void), [typeof(int).MakeByRefType(), typeof(double).MakeByRefType(), typeof(double).MakeByRefType()], typeof(CompiledProgram).Module, skipVisibility: true);
        var il = method.GetILGenerator();
        var carry = il.DeclareLocal(typeof(double));
        new InstructionEmitter(il, list, PutVariable, TakeOutput).Emit();
        il.Emit(OpCodes.Ret);
        return new CompiledProgram(method.CreateDelegate<Body>(), list.Outputs);

        void PutVariable(int variable)
        {
            InstructionEmitter.Address(il, 0, variable * sizeof(int));
            il.Emit(OpCodes.Ldind_I4);
        }

        void TakeOutput(int output)
        {
            il.Emit(OpCodes.Stloc, carry);
            InstructionEmitter.Address(il, 2, output * sizeof(double));
            il.Emit(OpCodes.Ldloc, carry);
            il.Emit(OpCodes.Stind_R8);
        }
    }

    // The method reads by offset, without bounds checks: lengths are the caller's duty and checked by the callers' layouts.
    public void Run(ReadOnlySpan<int> marking, ReadOnlySpan<double> givens, Span<double> outputs)
    {
        ArgumentOutOfRangeException.ThrowIfLessThan(outputs.Length, OutputCount);
        body(ref MemoryMarshal.GetReference(marking), ref MemoryMarshal.GetReference(givens), ref MemoryMarshal.GetReference(outputs));
    }
}
