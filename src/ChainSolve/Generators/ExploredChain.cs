using System.Globalization;
using ChainSolve.Expressions;
using ChainSolve.Language.Diagnostics;
using ChainSolve.Language.Text;
using ChainSolve.Modelling;
using ChainSolve.Numerics.Operators;
using ChainSolve.StateSpace;

namespace ChainSolve.Generators;

/// <summary>A chain whose states were explored.</summary>
internal sealed class ExploredChain : Chain
{
    private const int StatesBetweenLooks = 4096;

    private readonly ExploreOptions options;

    public ExploredChain(
        BoundModel model,
        GivenValues givens,
        ExploreOptions options,
        IReadOnlyList<(int[] Marking, double Probability)> starts,
        StateTable states,
        GeneratorRows rows,
        Generator generator,
        bool isRefilled,
        CancellationToken cancellation)
    {
        (Model, Givens, States, Rows, Generator, IsRefilled, this.options) = (model, givens, states, rows, generator, isRefilled, options);
        Start = new double[states.Count];
        foreach (var (marking, probability) in starts)
        {
            Start[states.Find(marking)] += probability;
        }

        Warnings = ChainWarnings.Of(this, rows.Happens, cancellation);
    }

    public override BoundModel Model { get; }

    public override GivenValues Givens { get; }

    public override StateTable States { get; }

    public override Generator Generator { get; }

    public override double[] Start { get; }

    public override IReadOnlyList<Diagnostic> Warnings { get; }

    /// <summary>The rows that the generator was made of.</summary>
    public GeneratorRows Rows { get; }

    /// <summary>Whether the states of another chain were taken over.</summary>
    public bool IsRefilled { get; }

    public override double[] Evaluate(NumberExpr expression, CancellationToken cancellation)
    {
        var values = new double[States.Count];
        ForEach(expression, (state, value) => values[state] = value, cancellation);
        return values;
    }

    public override bool[] Evaluate(ConditionExpr condition, CancellationToken cancellation)
    {
        var truths = new bool[States.Count];
        ForEach(condition, (state, value) => truths[state] = value != 0, cancellation);
        return truths;
    }

    public override string Describe(int state)
    {
        var marking = new int[Model.Variables.Count];
        States.ReadMarking(state, marking);
        return StateWords.Describe(Model, marking);
    }

    private void ForEach(Expr expression, Action<int, double> take, CancellationToken cancellation)
    {
        var program = ExprCompiler.Compile([expression], options.BackEnd);
        for (var first = 0L; first < States.Count; first += StatesBetweenLooks)
        {
            cancellation.ThrowIfCancellationRequested();
            States.Visit((int)first, (int)Math.Min(StatesBetweenLooks, States.Count - first), Evaluate);
        }

        void Evaluate(int state, ReadOnlySpan<int> marking)
        {
            Span<double> value = stackalloc double[1];
            program.Run(marking, Givens.AsSpan(), value);
            if (!double.IsFinite(value[0]))
            {
                throw new ModelFaultsException([new Diagnostic(
                    StateCodes.Value,
                    Severity.Fault,
                    string.Create(CultureInfo.InvariantCulture, $"a value that this measure needs {(double.IsNaN(value[0]) ? "does not exist" : $"is {value[0]}")} in the state '{Describe(state)}'; look for a division by zero or the logarithm of zero"),
                    new TextSpan(0, 0),
                    Model.Source)]);
            }

            take(state, value[0]);
        }
    }
}
