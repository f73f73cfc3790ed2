using System.Reflection.Emit;
using ChainSolve.Expressions;

namespace ChainSolve.StateSpace;

/// <summary>
/// Writes the method of a <see cref="SuccessorProgram{TKey}"/>: it unpacks the key into local variables, works out each rate, and where that is
/// not zero adds to the key what the transition always adds.
/// </summary>
/// <remarks>It gives up by -1 for a rate that is no rate, for a transition that is enabled and not possible, and for one that is none of a fixed shift.</remarks>
internal sealed class SuccessorEmitter
{
    // Some room for what solvers add, and for the order of adding.
    private const double LargestSum = 1e300;

    private readonly ILGenerator il;
    private readonly int words;
    private readonly LocalBuilder[] variables;
    private readonly LocalBuilder[] key;
    private readonly LocalBuilder rate;
    private readonly LocalBuilder group;
    private readonly LocalBuilder sum;
    private readonly LocalBuilder count;
    private readonly Label giveUp;

    private SuccessorEmitter(ILGenerator il, int words, int variables)
    {
        (this.il, this.words) = (il, words);
        this.variables = [.. Enumerable.Range(0, variables).Select(_ => il.DeclareLocal(typeof(int)))];
        key = [.. Enumerable.Range(0, words).Select(_ => il.DeclareLocal(typeof(ulong)))];
        rate = il.DeclareLocal(typeof(double));
        group = il.DeclareLocal(typeof(double));
        sum = il.DeclareLocal(typeof(double));
        count = il.DeclareLocal(typeof(int));
        giveUp = il.DefineLabel();
    }

    /// <summary>Writes it.</summary>
    /// <param name="layout">How a key is made up.</param>
    /// <param name="rates">The instructions of the rates.</param>
    /// <param name="steps">What each outcome of a transition does, in the order of the rates; by ascending shifts.</param>
    /// <param name="words">How many words of 64 bits a key has, the lowest first: 1 or 2.</param>
    public static DynamicMethod Emit(StateLayout layout, InstructionList rates, IReadOnlyList<SuccessorStep> steps, int words)
    {
        Type[] arguments = [typeof(ulong), typeof(double), typeof(double), typeof(ulong), typeof(bool), typeof(double)];
        var method = new DynamicMethod(
            "Successors", typeof(int), [.. arguments.Select(a => a.MakeByRefType())], typeof(SuccessorEmitter).Module, skipVisibility: true);
        new SuccessorEmitter(method.GetILGenerator(), words, layout.Model.Variables.Count).Emit(layout, rates, steps);
        return method;
    }

    private void Emit(StateLayout layout, InstructionList rates, IReadOnlyList<SuccessorStep> steps)
    {
        for (var w = 0; w < words; w++)
        {
            InstructionEmitter.Address(il, 0, w * sizeof(ulong));
            il.Emit(OpCodes.Ldind_I8);
            il.Emit(OpCodes.Stloc, key[w]);
        }

        new UnpackEmitter(il, layout, key, variables).Emit();
        new InstructionEmitter(il, rates, v => il.Emit(OpCodes.Ldloc, variables[v]), output => Take(output, steps)).Emit();
        il.Emit(OpCodes.Ldloc, sum);
        il.Emit(OpCodes.Ldc_R8, LargestSum);
        il.Emit(OpCodes.Bge_Un, giveUp);
        il.Emit(OpCodes.Ldloc, count);
        il.Emit(OpCodes.Ret);
        il.MarkLabel(giveUp);
        il.Emit(OpCodes.Ldc_I4_M1);
        il.Emit(OpCodes.Ret);
    }

    private void Take(int output, IReadOnlyList<SuccessorStep> steps)
    {
        var step = steps[output];
        var isFirst = output == 0 || !steps[output - 1].LeadsTheSameWay(step);
        var isLast = output == steps.Count - 1 || !steps[output + 1].LeadsTheSameWay(step);
        var next = il.DefineLabel();
        SkipIfZero(next);
        if (step.Needs is null)
        {
            il.Emit(OpCodes.Br, giveUp);
        }
        else
        {
            Check(step.Needs);
            Count(output);
            if (step.IsDrawn)
            {
                ShareOut(output, next);
            }

            if (isFirst && isLast && !step.IsStill)
            {
                Append(step.Shift, rate);
            }
            else if (!step.IsStill)
            {
                AddTo(group, rate);
            }
        }

        il.MarkLabel(next);
        if (isLast && !isFirst && !step.IsStill && step.Needs is not null)
        {
            CloseGroup(step);
        }
    }

    // Takes the value on the stack as the rate; what is neither zero nor a rate is looked at elsewhere.
    private void SkipIfZero(Label next)
    {
        var isRate = il.DefineLabel();
        il.Emit(OpCodes.Stloc, rate);
        il.Emit(OpCodes.Ldloc, rate);
        il.Emit(OpCodes.Ldc_R8, 0.0);
        il.Emit(OpCodes.Bgt, isRate);
        il.Emit(OpCodes.Ldloc, rate);
        il.Emit(OpCodes.Ldc_R8, 0.0);
        il.Emit(OpCodes.Beq, next);
        il.Emit(OpCodes.Br, giveUp);
        il.MarkLabel(isRate);
    }

    // An outcome with the chance 0 is none; a rate that vanishes is looked at elsewhere.
    private void ShareOut(int output, Label next)
    {
        var isRate = il.DefineLabel();
        InstructionEmitter.Address(il, 5, output * sizeof(double));
        il.Emit(OpCodes.Ldind_R8);
        il.Emit(OpCodes.Ldc_R8, 0.0);
        il.Emit(OpCodes.Beq, next);
        il.Emit(OpCodes.Ldloc, rate);
        InstructionEmitter.Address(il, 5, output * sizeof(double));
        il.Emit(OpCodes.Ldind_R8);
        il.Emit(OpCodes.Mul);
        il.Emit(OpCodes.Stloc, rate);
        il.Emit(OpCodes.Ldloc, rate);
        il.Emit(OpCodes.Ldc_R8, 0.0);
        il.Emit(OpCodes.Bgt, isRate);
        il.Emit(OpCodes.Br, giveUp);
        il.MarkLabel(isRate);
    }

    // Several transitions that lead the same way have one successor together.
    private void CloseGroup(SuccessorStep step)
    {
        var isEmpty = il.DefineLabel();
        il.Emit(OpCodes.Ldloc, group);
        il.Emit(OpCodes.Ldc_R8, 0.0);
        il.Emit(OpCodes.Ble, isEmpty);
        Append(step.Shift, group);
        il.Emit(OpCodes.Ldc_R8, 0.0);
        il.Emit(OpCodes.Stloc, group);
        il.MarkLabel(isEmpty);
    }

    private void Check(VariableRange[] needs)
    {
        foreach (var need in needs)
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
    }

    private void GiveUpIf(OpCode isBeyond, int variable, int end)
    {
        il.Emit(OpCodes.Ldloc, variables[variable]);
        il.Emit(OpCodes.Ldc_I4, end);
        il.Emit(isBeyond, giveUp);
    }

    private void Count(int output)
    {
        AddTo(sum, rate);
        InstructionEmitter.Address(il, 4, output);
        il.Emit(OpCodes.Ldc_I4_1);
        il.Emit(OpCodes.Stind_I1);
    }

    private void AddTo(LocalBuilder total, LocalBuilder value)
    {
        il.Emit(OpCodes.Ldloc, total);
        il.Emit(OpCodes.Ldloc, value);
        il.Emit(OpCodes.Add);
        il.Emit(OpCodes.Stloc, total);
    }

    private void Append(UInt128 shift, LocalBuilder value)
    {
        Cell(2, sizeof(double));
        il.Emit(OpCodes.Ldloc, value);
        il.Emit(OpCodes.Stind_R8);

        Cell(3, words * sizeof(ulong));
        il.Emit(OpCodes.Ldloc, key[0]);
        il.Emit(OpCodes.Ldc_I8, (long)(ulong)shift);
        il.Emit(OpCodes.Add);
        il.Emit(OpCodes.Stind_I8);
        if (words == 2)
        {
            AppendUpper(shift);
        }

        il.Emit(OpCodes.Ldloc, count);
        il.Emit(OpCodes.Ldc_I4_1);
        il.Emit(OpCodes.Add);
        il.Emit(OpCodes.Stloc, count);
    }

    // The sum of the lower words is smaller than one of them where it carries.
    private void AppendUpper(UInt128 shift)
    {
        Cell(3, 2 * sizeof(ulong));
        il.Emit(OpCodes.Ldc_I4, sizeof(ulong));
        il.Emit(OpCodes.Add);
        il.Emit(OpCodes.Ldloc, key[0]);
        il.Emit(OpCodes.Ldc_I8, (long)(ulong)shift);
        il.Emit(OpCodes.Add);
        il.Emit(OpCodes.Ldloc, key[0]);
        il.Emit(OpCodes.Clt_Un);
        il.Emit(OpCodes.Conv_U8);
        il.Emit(OpCodes.Ldloc, key[1]);
        il.Emit(OpCodes.Add);
        il.Emit(OpCodes.Ldc_I8, (long)(ulong)(shift >> 64));
        il.Emit(OpCodes.Add);
        il.Emit(OpCodes.Stind_I8);
    }

    private void Cell(int argument, int size)
    {
        il.Emit(OpCodes.Ldarg, (short)argument);
        il.Emit(OpCodes.Ldloc, count);
        il.Emit(OpCodes.Conv_I);
        il.Emit(OpCodes.Ldc_I4, size);
        il.Emit(OpCodes.Mul);
        il.Emit(OpCodes.Add);
    }
}
