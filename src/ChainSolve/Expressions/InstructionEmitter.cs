using System.Reflection;
using System.Reflection.Emit;

namespace ChainSolve.Expressions;

/// <summary>Writes instructions as the code of a method whose second argument refers to the givens.</summary>
/// <param name="il">Takes the code.</param>
/// <param name="list">The instructions.</param>
/// <param name="putVariable">Writes the code that puts a variable on the stack, as a whole number.</param>
/// <param name="takeOutput">Writes the code that takes the value on the stack as the output of a number.</param>
internal sealed class InstructionEmitter(ILGenerator il, InstructionList list, Action<int> putVariable, Action<int> takeOutput)
{
    private readonly Dictionary<int, Label> labels = [];
    private readonly LocalBuilder[] slots = [.. Enumerable.Range(0, list.Slots).Select(_ => il.DeclareLocal(typeof(double)))];

    /// <summary>Puts the address of a cell behind the one that an argument refers to.</summary>
    public static void Address(ILGenerator il, int argument, int offset)
    {
        il.Emit(OpCodes.Ldarg, (short)argument);
        if (offset > 0)
        {
            il.Emit(OpCodes.Ldc_I4, offset);
            il.Emit(OpCodes.Add);
        }
    }

    /// <summary>Writes the code of all outputs.</summary>
    public void Emit()
    {
        for (var at = 0; at < list.Instructions.Length; at++)
        {
            if (labels.TryGetValue(at, out var label))
            {
                il.MarkLabel(label);
            }

            Emit(list.Instructions[at]);
        }

        if (labels.TryGetValue(list.Instructions.Length, out var end))
        {
            il.MarkLabel(end);
        }
    }

    private void Emit(Instruction instruction)
    {
        switch (instruction.Operation)
        {
            case Operation.Constant:
                il.Emit(OpCodes.Ldc_R8, instruction.Constant);
                break;
            case Operation.Given:
                Address(il, 1, instruction.Argument * sizeof(double));
                il.Emit(OpCodes.Ldind_R8);
                break;
            case Operation.Variable:
                putVariable(instruction.Argument);
                il.Emit(OpCodes.Conv_R8);
                break;
            case Operation.Load:
                il.Emit(OpCodes.Ldloc, slots[instruction.Argument]);
                break;
            case Operation.Store:
                il.Emit(OpCodes.Stloc, slots[instruction.Argument]);
                break;
            case Operation.Output:
                takeOutput(instruction.Argument);
                break;
            case Operation.Jump:
                il.Emit(OpCodes.Br, LabelAt(instruction.Argument));
                break;
            case Operation.JumpIfFalse:
                il.Emit(OpCodes.Ldc_R8, 0.0);
                il.Emit(OpCodes.Beq, LabelAt(instruction.Argument));
                break;
            case Operation.JumpIfTrue:
                il.Emit(OpCodes.Ldc_R8, 0.0);
                il.Emit(OpCodes.Bne_Un, LabelAt(instruction.Argument));
                break;
            case Operation.Add:
                il.Emit(OpCodes.Add);
                break;
            case Operation.Subtract:
                il.Emit(OpCodes.Sub);
                break;
            case Operation.Multiply:
                il.Emit(OpCodes.Mul);
                break;
            case Operation.Divide:
                il.Emit(OpCodes.Div);
                break;
            case Operation.Negate:
                il.Emit(OpCodes.Neg);
                break;
            case Operation.Equal:
                Condition(OpCodes.Ceq, negated: false);
                break;
            case Operation.NotEqual:
                Condition(OpCodes.Ceq, negated: true);
                break;
            case Operation.Less:
                Condition(OpCodes.Clt, negated: false);
                break;
            case Operation.LessOrEqual:
                Condition(OpCodes.Cgt_Un, negated: true);
                break;
            case Operation.Greater:
                Condition(OpCodes.Cgt, negated: false);
                break;
            case Operation.GreaterOrEqual:
                Condition(OpCodes.Clt_Un, negated: true);
                break;
            default:
                il.Emit(OpCodes.Call, MethodOf(instruction.Operation));
                break;
        }
    }

    private static MethodInfo MethodOf(Operation operation) => operation switch
    {
        Operation.DivideUnlessZero => ((Func<double, double, double>)ScalarMath.Divide).Method,
        Operation.Power => ((Func<double, double, double>)Math.Pow).Method,
        Operation.Min => ((Func<double, double, double>)Math.Min).Method,
        Operation.Max => ((Func<double, double, double>)Math.Max).Method,
        Operation.Choose => ((Func<double, double, double>)ScalarMath.Choose).Method,
        Operation.Abs => ((Func<double, double>)Math.Abs).Method,
        Operation.Floor => ((Func<double, double>)Math.Floor).Method,
        Operation.Ceil => ((Func<double, double>)Math.Ceiling).Method,
        Operation.Round => ((Func<double, double>)ScalarMath.Round).Method,
        Operation.Exp => ((Func<double, double>)Math.Exp).Method,
        Operation.Ln => ((Func<double, double>)Math.Log).Method,
        Operation.Sqrt => ((Func<double, double>)Math.Sqrt).Method,
        _ => throw new ArgumentOutOfRangeException(nameof(operation), operation, "The operation is no call."),
    };

    private void Condition(OpCode comparison, bool negated)
    {
        il.Emit(comparison);
        if (negated)
        {
            il.Emit(OpCodes.Ldc_I4_0);
            il.Emit(OpCodes.Ceq);
        }

        il.Emit(OpCodes.Conv_R8);
    }

    private Label LabelAt(int target)
    {
        if (!labels.TryGetValue(target, out var label))
        {
            label = il.DefineLabel();
            labels.Add(target, label);
        }

        return label;
    }
}
