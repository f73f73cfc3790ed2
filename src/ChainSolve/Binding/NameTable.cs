using ChainSolve.Language.Syntax;

namespace ChainSolve.Binding;

/// <summary>The names of the top level: one name space, each name once.</summary>
internal sealed class NameTable
{
    private readonly Dictionary<string, Symbol> byName = new(StringComparer.Ordinal);
    private readonly List<Symbol> all = [];

    /// <summary>All symbols in the order of the text.</summary>
    public IReadOnlyList<Symbol> All => all;

    /// <summary>What an expression can read by its bare name.</summary>
    public IEnumerable<string> Quantities => all
        .Where(s => s is GivenSymbol or LetSymbol or CounterSymbol)
        .Select(s => s.Name.Text);

    public Symbol? Find(string name) => byName.GetValueOrDefault(name);

    public IEnumerable<string> NamesOf<T>()
        where T : Symbol => all.OfType<T>().Select(s => s.Name.Text);

    /// <summary>The item and state that a bare name may mean; null where no item has such a state.</summary>
    public string? MemberHint(string name) => all
        .OfType<ItemSymbol>()
        .Where(i => i.StateIndex(name) >= 0)
        .Select(i => $"{i.Name.Text}.{name}")
        .FirstOrDefault();

    /// <summary>Fills the table with the names of a model; of a name that is declared twice the first counts.</summary>
    public static NameTable Of(ModelSyntax model, BindContext context)
    {
        var table = new NameTable();
        var givens = 0;
        foreach (var statement in model.Statements)
        {
            context.Sink.Enter(statement);
            switch (statement)
            {
                case GivenSyntax given:
                    table.Declare(new GivenSymbol(given, givens++), context);
                    break;
                case LetSyntax let:
                    table.Declare(new LetSymbol(let), context);
                    break;
                case CrewSyntax crew:
                    table.Declare(new CrewSymbol(crew), context);
                    break;
                case ItemSyntax item:
                    foreach (var head in item.Heads)
                    {
                        table.Declare(new ItemSymbol(item, head), context);
                    }

                    break;
                case CounterSyntax counter:
                    table.Declare(new CounterSymbol(counter), context);
                    break;
                case EventSyntax happening:
                    table.Declare(new EventSymbol(happening), context);
                    break;
                case RewardSyntax reward:
                    table.Declare(new RewardSymbol(reward), context);
                    break;
                case MeasureSyntax measure:
                    table.Declare(new MeasureSymbol(measure), context);
                    break;
            }
        }

        return table;
    }

    private void Declare(Symbol symbol, BindContext context)
    {
        if (byName.TryAdd(symbol.Name.Text, symbol))
        {
            all.Add(symbol);
            return;
        }

        var before = byName[symbol.Name.Text];
        var line = context.Source.PositionOf(before.Name.Span.Start).Line;
        context.Report(BindingFaults.DeclaredTwice(symbol.Name, before.Kind, line));
    }
}
