namespace ChainSolve.Language.Syntax;

/// <summary>Operators with one operand.</summary>
public enum UnaryOperator
{
    /// <summary><c>-x</c>.</summary>
    Negate,

    /// <summary><c>not c</c>.</summary>
    Not,
}

/// <summary>Operators that do not chain.</summary>
public enum BinaryOperator
{
    /// <summary><c>^</c>, from the right.</summary>
    Power,

    /// <summary><c>=</c>.</summary>
    Equal,

    /// <summary><c>!=</c>.</summary>
    NotEqual,

    /// <summary><c>&lt;</c>.</summary>
    Less,

    /// <summary><c>&lt;=</c>.</summary>
    LessOrEqual,

    /// <summary><c>&gt;</c>.</summary>
    Greater,

    /// <summary><c>&gt;=</c>.</summary>
    GreaterOrEqual,
}

/// <summary>Operators that are kept flat in a <see cref="ChainSyntax"/>. A chain holds operators of one level.</summary>
public enum ChainOperator
{
    /// <summary><c>or</c>.</summary>
    Or,

    /// <summary><c>and</c>.</summary>
    And,

    /// <summary><c>+</c>.</summary>
    Add,

    /// <summary><c>-</c>.</summary>
    Subtract,

    /// <summary><c>*</c>.</summary>
    Multiply,

    /// <summary><c>/</c>.</summary>
    Divide,

    /// <summary><c>per</c>, on the level of <c>*</c> and <c>/</c>.</summary>
    Per,
}
