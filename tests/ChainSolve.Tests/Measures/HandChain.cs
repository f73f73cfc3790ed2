using ChainSolve.Expressions;
using ChainSolve.Generators;
using ChainSolve.Language.Diagnostics;
using ChainSolve.Language.Text;
using ChainSolve.Modelling;
using ChainSolve.Numerics.Operators;
using ChainSolve.StateSpace;

namespace ChainSolve.Tests.Measures;

/// <summary>A chain written down state by state, whose conditions and rewards are vectors.</summary>
internal sealed class HandChain : Chain
{
    private readonly Dictionary<Expr, Array> values = new(ReferenceEqualityComparer.Instance);
    private readonly string[] names;

    /// <param name="names">The states, separated by blanks; the first has all of the start unless <paramref name="start"/> is given.</param>
    /// <param name="start">The start distribution.</param>
    /// <param name="moves">The rates.</param>
    public HandChain(string names, double[]? start, params (int From, int To, double Rate)[] moves)
    {
        this.names = names.Split(' ');
        var builder = new GeneratorBuilder(this.names.Length);
        foreach (var (from, to, rate) in moves)
        {
            builder.Add(from, to, rate);
        }

        Generator = builder.Build();
        Start = start ?? [1, .. new double[this.names.Length - 1]];
        Model = new BoundModel
        {
            Source = new SourceText("hand.chain", "measure asked"),
            Title = null,
            TimeBase = TimeBase.Hour,
            Givens = [],
            Items = [],
            Counters = [],
            Variables = [],
            Transitions = [],
            Rewards = [],
            Measures = [],
            Warnings = [],
        };
    }

    public override BoundModel Model { get; }

    public override GivenValues Givens { get; } = new([]);

    public override StateTable States => throw new InvalidOperationException("Measures ask the chain, not its table.");

    public override Generator Generator { get; }

    public override double[] Start { get; }

    public override IReadOnlyList<Diagnostic> Warnings => [];

    /// <summary>The condition that holds in some states.</summary>
    public ConditionExpr In(params string[] states)
    {
        var condition = new TruthExpr(true);
        values[condition] = Array.ConvertAll(names, n => states.Contains(n));
        return condition;
    }

    /// <summary>A reward of one number a state.</summary>
    public Earning Earns(params double[] rewards)
    {
        var rate = new ConstantExpr(0);
        values[rate] = rewards;
        return new Earning(rate, 0, null);
    }

    public override double[] Evaluate(NumberExpr expression, CancellationToken cancellation) => (double[])values[expression];

    public override bool[] Evaluate(ConditionExpr condition, CancellationToken cancellation) => (bool[])values[condition];

    public override string Describe(int state) => names[state];
}
