using ChainSolve.Expressions;
using ChainSolve.Language.Syntax;

namespace ChainSolve.Binding;

/// <summary>Puts arguments into functions. The same function with the same arguments gives the same node, so that graphs stay shared.</summary>
internal sealed class FunctionCalls(BindContext context, ExpressionBinder binder)
{
    private const int Most = 100_000;

    private readonly Dictionary<CallKey, BoundValue?> known = [];
    private bool isExhausted;

    /// <summary>The value of a call; null after a fault in it.</summary>
    public BoundValue? Instantiate(LetSymbol function, Identifier at, IReadOnlyList<BoundValue> arguments)
    {
        var key = new CallKey(function, arguments);
        if (known.TryGetValue(key, out var value) || isExhausted)
        {
            return value;
        }

        if (known.Count >= Most)
        {
            isExhausted = true;
            context.Report(BindingFaults.TooManyCalls(at, Most));
            return null;
        }

        var locals = new Dictionary<string, BoundValue?>(StringComparer.Ordinal);
        for (var i = 0; i < arguments.Count; i++)
        {
            locals[function.Syntax.Parameters![i].Text] = arguments[i];
        }

        var scope = new ExprScope { Locals = locals };
        value = binder.Bind(function.Syntax.Value, scope);
        known[key] = value;
        return value;
    }

    private readonly struct CallKey(LetSymbol function, IReadOnlyList<BoundValue> arguments) : IEquatable<CallKey>
    {
        private readonly LetSymbol function = function;
        private readonly IReadOnlyList<BoundValue> arguments = arguments;

        public bool Equals(CallKey other) =>
            ReferenceEquals(function, other.function) && arguments.SequenceEqual(other.arguments, SameNode.Instance);

        public override bool Equals(object? obj) => obj is CallKey other && Equals(other);

        public override int GetHashCode()
        {
            var hash = new HashCode();
            hash.Add(function);
            foreach (var argument in arguments)
            {
                hash.Add(SameNode.Instance.GetHashCode(argument));
            }

            return hash.ToHashCode();
        }
    }

    private sealed class SameNode : IEqualityComparer<BoundValue>
    {
        public static SameNode Instance { get; } = new();

        public bool Equals(BoundValue? x, BoundValue? y) =>
            (x as Quantity)?.Dimension == (y as Quantity)?.Dimension && Key(x).Equals(Key(y));

        public int GetHashCode(BoundValue value) => Key(value).GetHashCode();

        // Written numbers are compared by value, so that f(2) is bound once; all else is shared by reference.
        private static object Key(BoundValue? value) => value?.Node is ConstantExpr constant ? constant.Value : (object?)value?.Node ?? "";
    }
}
