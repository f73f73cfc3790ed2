namespace ChainSolve.Expressions;

/// <summary>Runs instructions in a loop.</summary>
internal sealed class InterpretedProgram(InstructionList list) : IExprProgram
{
    private const int SmallStack = 128;

    public int OutputCount => list.Outputs;

    public void Run(ReadOnlySpan<int> marking, ReadOnlySpan<double> givens, Span<double> outputs)
    {
        Span<double> stack = list.Depth <= SmallStack ? stackalloc double[SmallStack] : new double[list.Depth];
        Span<double> slots = list.Slots <= SmallStack ? stackalloc double[SmallStack] : new double[list.Slots];
        var instructions = list.Instructions;
        var top = -1;
        for (var at = 0; at < instructions.Length; at++)
        {
            ref readonly var instruction = ref instructions[at];
            switch (instruction.Operation)
            {
                case Operation.Constant:
                    stack[++top] = instruction.Constant;
                    break;
                case Operation.Given:
                    stack[++top] = givens[instruction.Argument];
                    break;
                case Operation.Variable:
                    stack[++top] = marking[instruction.Argument];
                    break;
                case Operation.Load:
                    stack[++top] = slots[instruction.Argument];
                    break;
                case Operation.Store:
                    slots[instruction.Argument] = stack[top--];
                    break;
                case Operation.Output:
                    outputs[instruction.Argument] = stack[top--];
                    break;
                case Operation.Jump:
                    at = instruction.Argument - 1;
                    break;
                case Operation.JumpIfFalse:
                    at = stack[top--] == 0 ? instruction.Argument - 1 : at;
                    break;
                case Operation.JumpIfTrue:
                    at = stack[top--] != 0 ? instruction.Argument - 1 : at;
                    break;
                case Operation.Negate or Operation.Abs or Operation.Floor or Operation.Ceil or Operation.Round or Operation.Exp
                    or Operation.Ln or Operation.Sqrt:
                    stack[top] = Of(instruction.Operation, stack[top]);
                    break;
                default:
                    top--;
                    stack[top] = Of(instruction.Operation, stack[top], stack[top + 1]);
                    break;
            }
        }
    }

    private static double Of(Operation operation, double x) => operation switch
    {
        Operation.Negate => -x,
        Operation.Abs => Math.Abs(x),
        Operation.Floor => Math.Floor(x),
        Operation.Ceil => Math.Ceiling(x),
        Operation.Round => ScalarMath.Round(x),
        Operation.Exp => Math.Exp(x),
        Operation.Ln => Math.Log(x),
        _ => Math.Sqrt(x),
    };

    private static double Of(Operation operation, double x, double y) => operation switch
    {
        Operation.Add => x + y,
        Operation.Subtract => x - y,
        Operation.Multiply => x * y,
        Operation.Divide => x / y,
        Operation.DivideUnlessZero => ScalarMath.Divide(x, y),
        Operation.Power => Math.Pow(x, y),
        Operation.Min => Math.Min(x, y),
        Operation.Max => Math.Max(x, y),
        Operation.Choose => ScalarMath.Choose(x, y),
        Operation.Equal => x == y ? 1 : 0,
        Operation.NotEqual => x != y ? 1 : 0,
        Operation.Less => x < y ? 1 : 0,
        Operation.LessOrEqual => x <= y ? 1 : 0,
        Operation.Greater => x > y ? 1 : 0,
        _ => x >= y ? 1 : 0,
    };
}
