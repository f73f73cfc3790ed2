namespace ChainSolve.Expressions;

/// <summary>A step of a stack machine whose cells are numbers; conditions are 1 and 0.</summary>
/// <param name="Operation">What it does.</param>
/// <param name="Argument">An index, a slot or a target, as the operation says.</param>
/// <param name="Constant">The number of <see cref="Operation.Constant"/>.</param>
internal readonly record struct Instruction(Operation Operation, int Argument = 0, double Constant = 0);

/// <summary>The operations of the stack machine.</summary>
internal enum Operation
{
    /// <summary>Puts the constant.</summary>
    Constant,

    /// <summary>Puts the given with the argument's index.</summary>
    Given,

    /// <summary>Puts the variable with the argument's index.</summary>
    Variable,

    /// <summary>These take two numbers and put one.</summary>
    Add,
    Subtract,
    Multiply,
    Divide,

    /// <summary>As <see cref="Divide"/>; by zero it puts what is no number.</summary>
    DivideUnlessZero,
    Power,
    Min,
    Max,
    Choose,

    /// <summary>These take one number and put one.</summary>
    Negate,
    Abs,
    Floor,
    Ceil,
    Round,
    Exp,
    Ln,
    Sqrt,

    /// <summary>These take two numbers and put a condition.</summary>
    Equal,
    NotEqual,
    Less,
    LessOrEqual,
    Greater,
    GreaterOrEqual,

    /// <summary>Goes on at the argument.</summary>
    Jump,

    /// <summary>Takes a condition and goes on at the argument if it is false.</summary>
    JumpIfFalse,

    /// <summary>Takes a condition and goes on at the argument if it is true.</summary>
    JumpIfTrue,

    /// <summary>Puts the number of the slot with the argument's index.</summary>
    Load,

    /// <summary>Takes a number into the slot with the argument's index.</summary>
    Store,

    /// <summary>Takes a number as the output with the argument's index.</summary>
    Output,
}
