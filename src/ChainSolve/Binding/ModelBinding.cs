using ChainSolve.Language.Syntax;
using ChainSolve.Language.Text;
using ChainSolve.Modelling;

namespace ChainSolve.Binding;

/// <summary>One run of the binder, in the order in which the parts need each other.</summary>
internal sealed class ModelBinding
{
    private readonly ModelSyntax syntax;
    private readonly int unitUses;
    private readonly TextSpan? firstUnit;
    private readonly FaultSink sink;
    private readonly BindContext context;
    private readonly NameTable names;
    private readonly ExpressionBinder expressions;
    private readonly EffectBinder effects;
    private readonly string? title;
    private readonly bool isPartial;

    public ModelBinding(ModelSyntax syntax)
    {
        this.syntax = syntax;
        isPartial = syntax.UnreadNames is not null;
        (unitUses, firstUnit) = UnitUses.In(syntax);
        sink = new FaultSink(syntax.Source, syntax.UnreadNames);
        var heading = new HeadingBinder(syntax, sink);
        title = heading.Title();
        context = new BindContext(syntax.Source, sink, heading.TimeBase(unitUses > 0, isPartial));
        names = NameTable.Of(syntax, context);
        expressions = new ExpressionBinder(context, names);
        effects = new EffectBinder(context, names, expressions);
    }

    public BindResult Run()
    {
        if (!names.All.Any(s => s is ItemSymbol or CounterSymbol))
        {
            sink.Enter(syntax);
            context.Report(BindingFaults.NothingToModel(new TextSpan(0, 0)));
        }

        ItemStates.Assign(names, context);
        var givens = Each<GivenSymbol, BoundGiven>(new GivenBinder(context, expressions).Bind);
        new LetBinder(context, names, expressions).BindAll();
        var crews = Each<CrewSymbol, BoundCrew>(BindCrew);
        var counters = Each<CounterSymbol, BoundCounter>(BindCounter);
        var items = Each<ItemSymbol, BoundItem>(new ItemBinder(context, names, expressions, effects).Bind);
        var transitions = new TransitionBinder(context, names, expressions, effects);
        transitions.BindAll(syntax);
        var rewards = Each<RewardSymbol, BoundReward>(reward => BindReward(reward, transitions));
        var measures = Each<MeasureSymbol, BoundMeasure>(BindMeasure());
        new UnusedNames(context, names, expressions).Report();
        if (sink.HasFaults || isPartial)
        {
            return new BindResult(null, sink.HasFaults ? sink.Finish(unitUses, firstUnit) : []);
        }

        var model = new BoundModel
        {
            Source = syntax.Source,
            Title = title,
            TimeBase = context.TimeBase,
            Givens = StateShape.Mark(givens, items, counters),
            Items = items,
            Counters = counters,
            Crews = crews,
            Variables = Variables(),
            Transitions = transitions.All,
            Rewards = rewards,
            Measures = measures,
            Warnings = [],
        };
        new DefaultValues(context, names, model).Check();
        var diagnostics = sink.Finish(unitUses, firstUnit);
        return new BindResult(sink.HasFaults ? null : model with { Warnings = diagnostics }, diagnostics);
    }

    private List<TBound> Each<TSymbol, TBound>(Func<TSymbol, TBound?> bind)
        where TSymbol : Symbol
        where TBound : class =>
        [.. names.All.OfType<TSymbol>().Select(bind).OfType<TBound>()];

    private BoundCrew? BindCrew(CrewSymbol crew)
    {
        context.Sink.Enter(crew.Syntax);
        var place = $"the size of crew '{crew.Name.Text}'";
        crew.Count = expressions.BindQuantity(crew.Syntax.Count, ExprScope.Fixed(place), Dimension.Plain, place);
        return crew.Count is null ? null : new BoundCrew(crew.Name.Text, crew.Count.Expr, crew.Name.Span);
    }

    private BoundCounter? BindCounter(CounterSymbol counter)
    {
        context.Sink.Enter(counter.Syntax);
        var place = $"the range of counter '{counter.Name.Text}'";
        var low = expressions.BindQuantity(counter.Syntax.Range.Low, ExprScope.Fixed(place), Dimension.Plain, place);
        var high = expressions.BindQuantity(counter.Syntax.Range.High, ExprScope.Fixed(place), Dimension.Plain, place);
        var startPlace = $"the start of counter '{counter.Name.Text}'";
        var start = counter.Syntax.Start is null
            ? low
            : expressions.BindQuantity(counter.Syntax.Start, ExprScope.Fixed(startPlace), Dimension.Plain, startPlace);
        return low is null || high is null || start is null
            ? null
            : new BoundCounter
            {
                Name = counter.Name.Text,
                Low = low.Expr,
                High = high.Expr,
                Start = start.Expr,
                Variable = counter.Variable!.Index,
                Span = counter.Name.Span,
            };
    }

    private BoundReward? BindReward(RewardSymbol reward, TransitionBinder transitions)
    {
        reward.Earning = new RewardBinder(context, names, expressions, transitions.OfMove).Bind(reward.Syntax);
        return reward.Earning is null ? null : new BoundReward { Name = reward.Name.Text, Earning = reward.Earning };
    }

    private Func<MeasureSymbol, BoundMeasure?> BindMeasure()
    {
        var binder = new MeasureBinder(context, names, expressions, new SentenceText(syntax.Source, syntax.Comments));
        return measure => binder.Bind(measure.Syntax);
    }

    private List<BoundVariable> Variables()
    {
        var variables = new List<BoundVariable>();
        var index = 0;
        foreach (var item in names.All.OfType<ItemSymbol>())
        {
            variables.AddRange(item.States.Select((state, at) => new BoundVariable(index, at, $"{item.Name.Text}.{state}")));
            index++;
        }

        variables.AddRange(names.All.OfType<CounterSymbol>().Select((counter, at) => new BoundVariable(-1, at, counter.Name.Text)));
        return variables;
    }
}
