using ChainSolve.Expressions;
using ChainSolve.Language.Syntax;

namespace ChainSolve.Binding;

/// <summary>An item with its states and, once bound, its moves.</summary>
internal sealed class ItemSymbol(ItemSyntax syntax, ItemHeadSyntax head) : Symbol(head.Name)
{
    private readonly List<string> states = [];
    private readonly Dictionary<string, int> indices = new(StringComparer.Ordinal);

    public ItemSyntax Syntax { get; } = syntax;

    public ItemHeadSyntax Head { get; } = head;

    public bool IsReplicated => Head.Count is not null;

    /// <summary>Whether other items share its body, so that messages have to name the item.</summary>
    public bool SharesBody => Syntax.Heads.Count > 1;

    /// <summary>The names of the states in order.</summary>
    public IReadOnlyList<string> States => states;

    /// <summary>One a state: how many replicas are in it.</summary>
    public List<VariableExpr> Places { get; } = [];

    public int FirstVariable { get; set; }

    public Quantity? Count { get; set; }

    public List<MoveDraft> Moves { get; } = [];

    public override string Kind => "an item";

    /// <summary>The names of its moves, each once, in order.</summary>
    public IReadOnlyList<string> MoveNames { get; } =
        [.. syntax.Clauses.OfType<MoveSyntax>().Select(m => m.Name?.Text).OfType<string>().Distinct()];

    /// <summary>Adds a state; false where it is there already.</summary>
    public bool AddState(string name)
    {
        if (!indices.TryAdd(name, states.Count))
        {
            return false;
        }

        states.Add(name);
        return true;
    }

    /// <summary>The index of a state; -1 where there is none of the name.</summary>
    public int StateIndex(string name) => indices.GetValueOrDefault(name, -1);
}
