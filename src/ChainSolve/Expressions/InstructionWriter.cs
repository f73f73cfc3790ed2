namespace ChainSolve.Expressions;

/// <summary>
/// Turns expressions into instructions. A node that is referred to more than once gets a slot and is evaluated once, before the outputs;
/// as arithmetic on doubles never throws, it does no harm where its value is not needed.
/// </summary>
/// <remarks>
/// Division by zero gives no number, and so does all that is made of it: a condition that needs a number which is not there is neither 1 nor
/// 0, and a choice by it gives no number either. So nothing undefined can hide behind a comparison.
/// </remarks>
internal sealed class InstructionWriter
{
    private readonly IReadOnlyList<Expr> outputs;
    private readonly Dictionary<Expr, int> references;
    private readonly Dictionary<Expr, int> slots = new(ReferenceEqualityComparer.Instance);
    private readonly HashSet<Expr> undefined;
    private readonly List<Instruction> instructions = [];
    private int slotCount;
    private int depth;
    private int deepest;

    public InstructionWriter(IReadOnlyList<Expr> outputs)
    {
        this.outputs = outputs;
        references = ExprChildren.CountReferences(outputs);
        undefined = UndefinedValues.Of(outputs);
    }

    public InstructionList Write()
    {
        foreach (var shared in ExprChildren.ChildrenFirst(outputs).Where(e => references[e] > 1 && !IsLeaf(e)))
        {
            PutValue(shared);
            slots.Add(shared, Keep());
        }

        for (var i = 0; i < outputs.Count; i++)
        {
            Put(outputs[i]);
            Add(Operation.Output, -1, i);
        }

        return new InstructionList([.. instructions], slotCount, deepest, outputs.Count);
    }

    private static bool IsLeaf(Expr expr) => expr is ConstantExpr or TruthExpr or GivenExpr or VariableExpr;

    private void Put(Expr expr)
    {
        if (slots.TryGetValue(expr, out var slot))
        {
            Add(Operation.Load, 1, slot);
        }
        else if (StackGuard.IsShort)
        {
            StackGuard.OnFreshStack(() =>
            {
                PutValue(expr);
                return true;
            });
        }
        else
        {
            PutValue(expr);
        }
    }

    private void PutValue(Expr expr)
    {
        switch (expr)
        {
            case ConstantExpr constant:
                Constant(constant.Value);
                break;
            case TruthExpr truth:
                Constant(truth.Value ? 1 : 0);
                break;
            case GivenExpr given:
                Add(Operation.Given, 1, given.Index);
                break;
            case VariableExpr variable:
                Add(Operation.Variable, 1, variable.Index);
                break;
            case SumExpr sum:
                PutSum(sum);
                break;
            case ProductExpr product:
                PutProduct(product);
                break;
            case NegateExpr negate:
                Put(negate.Operand);
                Add(Operation.Negate, 0);
                break;
            case PowerExpr power:
                Put(power.Base);
                Put(power.Exponent);
                Add(Operation.Power, -1);
                break;
            case FunctionExpr function:
                PutFunction(function);
                break;
            case CountExpr count:
                Constant(0);
                foreach (var condition in count.Conditions)
                {
                    Put(condition);
                    Add(Operation.Add, -1);
                }

                break;
            case ChooseNumberExpr choose:
                PutChoice(choose.Condition, choose.WhenTrue, choose.WhenFalse);
                break;
            case ChooseConditionExpr choose:
                PutChoice(choose.Condition, choose.WhenTrue, choose.WhenFalse);
                break;
            case CompareExpr compare:
                PutComparison(compare);
                break;
            case NotExpr not:
                Constant(1);
                Put(not.Operand);
                Add(Operation.Subtract, -1);
                break;
            case AllExpr all:
                PutRun(all.Operands, Operation.JumpIfFalse);
                break;
            case AnyExpr any:
                PutRun(any.Operands, Operation.JumpIfTrue);
                break;
            default:
                throw new ArgumentException($"An expression of the type {expr.GetType().Name} cannot be evaluated.", nameof(expr));
        }
    }

    private void PutSum(SumExpr sum)
    {
        if (sum.Terms.Count == 0)
        {
            Constant(0);
        }

        for (var i = 0; i < sum.Terms.Count; i++)
        {
            Put(sum.Terms[i].Value);
            if (i > 0)
            {
                Add(sum.Terms[i].IsSubtracted ? Operation.Subtract : Operation.Add, -1);
            }
            else if (sum.Terms[i].IsSubtracted)
            {
                Add(Operation.Negate, 0);
            }
        }
    }

    private void PutProduct(ProductExpr product)
    {
        if (product.Factors.Count == 0 || product.Factors[0].IsDivided)
        {
            Constant(1);
        }

        for (var i = 0; i < product.Factors.Count; i++)
        {
            var factor = product.Factors[i];
            Put(factor.Value);
            if (i > 0 || factor.IsDivided)
            {
                Add(!factor.IsDivided ? Operation.Multiply : factor.Value is ConstantExpr { Value: not 0 } ? Operation.Divide : Operation.DivideUnlessZero, -1);
            }
        }
    }

    private void PutFunction(FunctionExpr function)
    {
        Put(function.Arguments[0]);
        var operation = function.Function switch
        {
            BuiltInFunction.Min => Operation.Min,
            BuiltInFunction.Max => Operation.Max,
            BuiltInFunction.Choose => Operation.Choose,
            BuiltInFunction.Abs => Operation.Abs,
            BuiltInFunction.Floor => Operation.Floor,
            BuiltInFunction.Ceil => Operation.Ceil,
            BuiltInFunction.Round => Operation.Round,
            BuiltInFunction.Exp => Operation.Exp,
            BuiltInFunction.Ln => Operation.Ln,
            _ => Operation.Sqrt,
        };
        if (operation is not (Operation.Min or Operation.Max or Operation.Choose))
        {
            Add(operation, 0);
            return;
        }

        foreach (var argument in function.Arguments.Skip(1))
        {
            Put(argument);
            Add(operation, -1);
        }
    }

    private void PutComparison(CompareExpr compare)
    {
        if (compare.IsFalseIfUndefined || !undefined.Contains(compare))
        {
            Put(compare.Left);
            Put(compare.Right);
            Add(Operation.Equal + (int)compare.Comparison, -1);
            return;
        }

        // Zero times a number is added, which changes nothing, or zero times what is no number.
        Put(compare.Left);
        var left = Keep();
        Put(compare.Right);
        var right = Keep();
        Add(Operation.Load, 1, left);
        Add(Operation.Load, 1, right);
        Add(Operation.Equal + (int)compare.Comparison, -1);
        foreach (var side in new[] { left, right })
        {
            Add(Operation.Load, 1, side);
            Constant(0);
            Add(Operation.Multiply, -1);
            Add(Operation.Add, -1);
        }
    }

    private void PutChoice(Expr condition, Expr whenTrue, Expr whenFalse)
    {
        var kept = PutCondition(condition);
        var toFalse = Hold(-1);
        Put(whenTrue);
        if (kept is { } slot)
        {
            Add(Operation.Load, 1, slot);
            Add(Operation.Multiply, -1);
        }

        var toEnd = Hold(0);
        Fill(toFalse, Operation.JumpIfFalse);
        depth--;
        Put(whenFalse);
        Fill(toEnd, Operation.Jump);
    }

    private void PutRun(IReadOnlyList<ConditionExpr> operands, Operation jump)
    {
        var exits = new List<(int At, int? Kept)>();
        foreach (var operand in operands)
        {
            var kept = PutCondition(operand);
            exits.Add((Hold(-1), kept));
        }

        // All that were passed held, so that their product is 1; of those passed by the other run none did.
        Constant(jump == Operation.JumpIfFalse ? 1 : 0);
        foreach (var slot in exits.Select(e => e.Kept).OfType<int>().Where(_ => jump == Operation.JumpIfFalse))
        {
            Add(Operation.Load, 1, slot);
            Add(Operation.Multiply, -1);
        }

        var toEnd = new List<int> { Hold(0) };
        foreach (var exit in exits.Where(e => e.Kept is not null && jump == Operation.JumpIfTrue))
        {
            Fill(exit.At, jump);
            depth--;
            Add(Operation.Load, 1, exit.Kept!.Value);
            toEnd.Add(Hold(0));
        }

        foreach (var exit in exits.Where(e => e.Kept is null || jump == Operation.JumpIfFalse))
        {
            Fill(exit.At, jump);
        }

        depth--;
        Constant(jump == Operation.JumpIfFalse ? 0 : 1);
        toEnd.ForEach(at => Fill(at, Operation.Jump));
    }

    /// <summary>Puts a condition; the slot that keeps it where it may be neither 1 nor 0.</summary>
    private int? PutCondition(Expr condition)
    {
        Put(condition);
        if (!undefined.Contains(condition))
        {
            return null;
        }

        var slot = Keep();
        Add(Operation.Load, 1, slot);
        return slot;
    }

    /// <summary>Takes the number on top into a slot of its own.</summary>
    private int Keep()
    {
        Add(Operation.Store, -1, slotCount);
        return slotCount++;
    }

    // A jump whose target is not known yet.
    private int Hold(int change)
    {
        Add(Operation.Jump, change);
        return instructions.Count - 1;
    }

    private void Fill(int at, Operation jump) => instructions[at] = new Instruction(jump, instructions.Count);

    private void Constant(double value)
    {
        Count(1);
        instructions.Add(new Instruction(Operation.Constant, 0, value));
    }

    private void Add(Operation operation, int change, int argument = 0)
    {
        Count(change);
        instructions.Add(new Instruction(operation, argument));
    }

    private void Count(int change)
    {
        depth += change;
        deepest = Math.Max(deepest, depth);
    }
}
