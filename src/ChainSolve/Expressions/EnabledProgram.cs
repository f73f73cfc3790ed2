using System.Reflection.Emit;
using System.Runtime.InteropServices;

namespace ChainSolve.Expressions;

/// <summary>
/// One compiled method for the rates of a whole model: it lists those that are not zero. It gives up where one of them needs a closer look.
/// Immutable; safe to share between threads.
/// </summary>
internal sealed class EnabledProgram
{
    private readonly Body body;
    private readonly int outputCount;

    private EnabledProgram(Body body, int outputCount) => (this.body, this.outputCount) = (body, outputCount);

    private delegate int Body(ref int marking, ref double givens, ref double rates, ref int enabled);

    /// <summary>Compiles it.</summary>
    /// <param name="rates">The instructions of the rates.</param>
    /// <param name="needs">For each rate: where the variables have to be if it is not zero; null for a rate that always needs a closer look then.</param>
    public static EnabledProgram Of(InstructionList rates, IReadOnlyList<VariableRange[]?> needs)
    {
        var method = new DynamicMethod(
            "Enabled",
            typeof(int),
            [typeof(int).MakeByRefType(), typeof(double).MakeByRefType(), typeof(double).MakeByRefType(), typeof(int).MakeByRefType()],
            typeof(EnabledProgram).Module,
            skipVisibility: true);
        new Writer(method.GetILGenerator()).Write(rates, needs);
        return new EnabledProgram(method.CreateDelegate<Body>(), rates.Outputs);
    }

    /// <summary>Lists the rates that are not zero, in their order, and their numbers.</summary>
    /// <returns>How many there are; -1 where one of them needs a closer look.</returns>
    public int Run(ReadOnlySpan<int> marking, ReadOnlySpan<double> givens, Span<double> rates, Span<int> enabled)
    {
        // The method reads and writes by offset, without bounds checks, as that of a compiled program does.
        ArgumentOutOfRangeException.ThrowIfLessThan(rates.Length, outputCount);
        ArgumentOutOfRangeException.ThrowIfLessThan(enabled.Length, outputCount);
        return body(
            ref MemoryMarshal.GetReference(marking), ref MemoryMarshal.GetReference(givens), ref MemoryMarshal.GetReference(rates), ref MemoryMarshal.GetReference(enabled));
    }

    private sealed class Writer(ILGenerator il)
    {
        private readonly LocalBuilder rate = il.DeclareLocal(typeof(double));
        private readonly LocalBuilder count = il.DeclareLocal(typeof(int));
        private readonly Label giveUp = il.DefineLabel();

        public void Write(InstructionList rates, IReadOnlyList<VariableRange[]?> needs)
        {
            new InstructionEmitter(il, rates).Emit(output => Take(output, needs[output]));
            il.Emit(OpCodes.Ldloc, count);
            il.Emit(OpCodes.Ret);
            il.MarkLabel(giveUp);
            il.Emit(OpCodes.Ldc_I4_M1);
            il.Emit(OpCodes.Ret);
        }

        private void Take(int output, VariableRange[]? needs)
        {
            var next = il.DefineLabel();
            il.Emit(OpCodes.Stloc, rate);
            il.Emit(OpCodes.Ldloc, rate);
            il.Emit(OpCodes.Ldc_R8, 0.0);
            il.Emit(OpCodes.Beq, next);
            if (needs is null)
            {
                il.Emit(OpCodes.Br, giveUp);
            }
            else
            {
                foreach (var need in needs)
                {
                    Check(need);
                }

                List(output);
            }

            il.MarkLabel(next);
        }

        private void Check(VariableRange need)
        {
            if (need.Least > int.MinValue)
            {
                GiveUpIf(OpCodes.Blt, need.Variable, need.Least);
            }

            if (need.Most < int.MaxValue)
            {
                GiveUpIf(OpCodes.Bgt, need.Variable, need.Most);
            }
        }

        private void GiveUpIf(OpCode isBeyond, int variable, int end)
        {
            InstructionEmitter.Address(il, OpCodes.Ldarg_0, variable * sizeof(int));
            il.Emit(OpCodes.Ldind_I4);
            il.Emit(OpCodes.Ldc_I4, end);
            il.Emit(isBeyond, giveUp);
        }

        private void List(int output)
        {
            Cell(OpCodes.Ldarg_2, sizeof(double));
            il.Emit(OpCodes.Ldloc, rate);
            il.Emit(OpCodes.Stind_R8);
            Cell(OpCodes.Ldarg_3, sizeof(int));
            il.Emit(OpCodes.Ldc_I4, output);
            il.Emit(OpCodes.Stind_I4);
            il.Emit(OpCodes.Ldloc, count);
            il.Emit(OpCodes.Ldc_I4_1);
            il.Emit(OpCodes.Add);
            il.Emit(OpCodes.Stloc, count);
        }

        private void Cell(OpCode argument, int size)
        {
            il.Emit(argument);
            il.Emit(OpCodes.Ldloc, count);
            il.Emit(OpCodes.Conv_I);
            il.Emit(OpCodes.Ldc_I4, size);
            il.Emit(OpCodes.Mul);
            il.Emit(OpCodes.Add);
        }
    }
}
