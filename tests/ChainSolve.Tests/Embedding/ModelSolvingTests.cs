using ChainSolve.Expressions;
using ChainSolve.Language.Syntax;
using ChainSolve.Modelling;
using ChainSolve.Numerics.Estimates;
using ChainSolve.Numerics.Iteration;
using ChainSolve.Tests.Measures;

namespace ChainSolve.Tests.Embedding;

/// <summary>What a program that embeds the library can ask of a model.</summary>
public class ModelSolvingTests
{
    private static readonly HandChain Unit = new("up down", null, (0, 1, 0.25), (1, 0, 1.75));

    private static HandModel Both() => new(
        Unit,
        HandMeasures.Steady(MeasureKind.Probability, Unit.In("up")).Measure with { Name = "long_run" },
        HandMeasures.At(MeasureKind.Probability, Unit.In("down")).Measure with
        {
            Name = "early",
            Times = [At(0), At(0.5)],
        });

    [Fact]
    public void Solve_All_ResultsByNameAndPosition()
    {
        var hand = Both();
        var solution = hand.Model.Solve();
        Assert.Equal(2, solution.StateCount);
        Assert.Equal(2, solution.TransitionCount);
        Assert.Equal(SolveStatus.Ok, solution.Status);
        Assert.Equal(["long_run", "early"], solution.Measures.Select(m => m.Name));
        Assert.Equal(0.875, solution.Measures["long_run"].Value, 1e-15);
        Assert.Equal(0.125 * (1 - Math.Exp(-1)), solution.Measures["early"].Points[1].Value, 1e-15);
        Assert.Same(hand.Model, solution.Model);
        var missing = Assert.Throws<KeyNotFoundException>(() => solution.Measures["late"]);
        Assert.Contains("long_run, early", missing.Message, StringComparison.Ordinal);
    }

    [Fact]
    public void Solve_Value_OfACurve_Throws()
    {
        var curve = Both().Model.Solve("early");
        Assert.Throws<InvalidOperationException>(() => curve.Value);
        Assert.Throws<InvalidOperationException>(() => curve.ErrorBound);
    }

    [Fact]
    public void Solve_SomeMeasures_OnlyThose()
    {
        var model = Both().Model;
        Assert.Equal(["early"], model.Solve(["early"]).Measures.Select(m => m.Name));
        Assert.Equal(["long_run", "early"], model.Solve(["early", "long_run"]).Measures.Select(m => m.Name));
        Assert.Throws<ArgumentException>(() => model.Solve([]));
        var unknown = Assert.Throws<ArgumentException>(() => model.Solve("long_rum"));
        Assert.StartsWith("There is no measure 'long_rum'; nearest: 'long_run'.", unknown.Message, StringComparison.Ordinal);
    }

    [Fact]
    public void Solve_Again_ChainIsKept()
    {
        var hand = Both();
        hand.Model.Solve();
        hand.Model.Solve("early");
        hand.Model.Explore();
        hand.Model.LikelyStates(1);
        Assert.Equal(1, hand.Builds);
    }

    [Fact]
    public void Solve_FromManyThreads_SameDigits()
    {
        var model = Both().Model;
        var values = new double[16];
        Parallel.For(0, values.Length, i => values[i] = model.Solve().Measures["early"].Points[1].Value);
        Assert.Single(values.Distinct());
    }

    [Fact]
    public void Solve_ModelThatAsksForNothing_Fault()
    {
        var fault = Assert.Single(Assert.Throws<ModelFaultsException>(() => new HandModel(Unit).Model.Solve()).Faults);
        Assert.Equal("N102", fault.Code);
    }

    [Theory]
    [InlineData(0.0)]
    [InlineData(1.5)]
    [InlineData(double.NaN)]
    public void Solve_ShareOfAQuantile_OutOfRange_Fault(double share)
    {
        var measure = HandMeasures.TimeTo(MeasureKind.QuantileTime, Unit.In("down")).Measure with { Share = new ConstantExpr(share) };
        var fault = Assert.Single(Assert.Throws<ModelFaultsException>(() => new HandModel(Unit, measure).Model.Solve()).Faults);
        Assert.Equal("B272", fault.Code);
    }

    [Fact]
    public void Solve_NegativeTime_Fault()
    {
        var measure = HandMeasures.At(MeasureKind.Probability, Unit.In("down")).Measure with { Times = [At(-1), At(1)] };
        var fault = Assert.Single(Assert.Throws<ModelFaultsException>(() => new HandModel(Unit, measure).Model.Solve()).Faults);
        Assert.Equal("B273", fault.Code);
    }

    [Fact]
    public void Solve_MoreStatesThanAllowed_Limit()
    {
        var limit = Assert.Throws<LimitExceededException>(() => Both().Model.Solve(new SolveOptions { MaxStates = 1 }));
        Assert.Equal("states", limit.Limit);
        Assert.StartsWith("the model has 2 states, more than the 1 allowed", limit.Message, StringComparison.Ordinal);
    }

    [Fact]
    public void Solve_TimeIsUp_Limit()
    {
        var hand = new HandModel(Unit, (_, cancellation) =>
        {
            cancellation.WaitHandle.WaitOne();
            cancellation.ThrowIfCancellationRequested();
            return Unit;
        });
        var limit = Assert.Throws<LimitExceededException>(() => hand.Model.Explore(new SolveOptions { TimeLimit = TimeSpan.FromMilliseconds(1) }));
        Assert.Equal("time", limit.Limit);
        Assert.StartsWith("the time limit of 0.001 s was hit", limit.Message, StringComparison.Ordinal);
    }

    [Fact]
    public void Solve_Cancelled_Throws()
    {
        var model = Both().Model;
        Assert.Throws<OperationCanceledException>(() => model.Solve(cancellation: new CancellationToken(true)));
        Assert.Throws<OperationCanceledException>(() => model.Solve(new SolveOptions { TimeLimit = TimeSpan.FromHours(1) }, new CancellationToken(true)));
    }

    [Fact]
    public void Solve_OptionsWithoutMeaning_Throw()
    {
        var model = Both().Model;
        Assert.Throws<ArgumentOutOfRangeException>(() => model.Solve(new SolveOptions { Tolerance = 0 }));
        Assert.Throws<ArgumentOutOfRangeException>(() => model.Solve(new SolveOptions { Tolerance = 1 }));
        Assert.Throws<ArgumentOutOfRangeException>(() => model.Solve(new SolveOptions { Negligible = -1 }));
        Assert.Throws<ArgumentOutOfRangeException>(() => model.Solve(new SolveOptions { Threads = 0 }));
        Assert.Throws<ArgumentOutOfRangeException>(() => model.Solve(new SolveOptions { MaxStates = 0 }));
        Assert.Throws<ArgumentOutOfRangeException>(() => model.Solve(new SolveOptions { TimeLimit = TimeSpan.Zero }));
        var method = Assert.Throws<ArgumentException>(() => model.Solve(new SolveOptions { StationaryMethod = "magic" }));
        Assert.StartsWith("There is no stationary method 'magic'; the methods are gth, ", method.Message, StringComparison.Ordinal);
    }

    [Fact]
    public void Solve_MethodByName_IsUsed()
    {
        var solution = Both().Model.Solve(new SolveOptions { TransientMethod = "uniformization", StationaryMethod = "sparse-gth" });
        Assert.Equal(["sparse-gth", "uniformization"], solution.Measures.Select(m => m.Method));
        Assert.All(solution.Measures, m => Assert.Equal("asked for by name", m.Why));
    }

    [Fact]
    public void Solve_WithProgress_ToldOfStages()
    {
        var told = new List<SolveProgress>();
        Both().Model.Solve(new SolveOptions { TransientMethod = "uniformization", Progress = new Listener(told) });
        Assert.Contains(told, p => p.Stage == "uniformization");
    }

    [Fact]
    public void Explore_ChainThatEnds_Figures()
    {
        var chain = new HandChain("start left right far", null, (0, 1, 1), (0, 2, 3), (2, 3, 2), (3, 2, 6));
        var found = new HandModel(chain).Model.Explore();
        Assert.Equal((4, 4L, 2, 1, 1, 6.0), (found.StateCount, found.TransitionCount, found.RecurrentClassCount, found.TransientStateCount, found.AbsorbingStateCount, found.LargestExitRate));
    }

    [Fact]
    public void TransitionMatrix_TwoStates_ClosedForm()
    {
        var matrix = Both().Model.TransitionMatrix(0.5);
        Assert.Equal(["up", "down"], matrix.States);
        Assert.Equal(0.5, matrix.Time);
        Assert.Equal(0.125 * (1 - Math.Exp(-1)), matrix[0, 1].Value, 1e-15);
        Assert.Equal(0.875 * (1 - Math.Exp(-1)), matrix[1, 0].Value, 1e-15);
        Assert.Throws<ArgumentOutOfRangeException>(() => Both().Model.TransitionMatrix(-1));
        Assert.Throws<ArgumentOutOfRangeException>(() => Both().Model.TransitionMatrix(double.NaN));
    }

    [Fact]
    public void LikelyStates_AtATimeAndInTheLongRun_ByChance()
    {
        var model = Both().Model;
        var early = model.LikelyStates(0.5);
        Assert.Equal(["up", "down"], early.States.Select(s => s.Description));
        Assert.Equal(0.125 * (1 - Math.Exp(-1)), early.States[1].Probability, 1e-15);
        Assert.InRange(early.States[1].ErrorBound, 1e-20, 1e-15);
        var late = model.LikelyStates(null, 1);
        Assert.Equal(0.875, Assert.Single(late.States).Probability, 1e-15);
        Assert.Equal((2, null), (late.StateCount, late.Time));
        Assert.Throws<ArgumentOutOfRangeException>(() => model.LikelyStates(1, 0));
    }

    private static SingleTime At(double time) => new() { Time = new ConstantExpr(time), Span = new(0, 0) };

    private sealed class Listener(List<SolveProgress> told) : IProgress<SolveProgress>
    {
        public void Report(SolveProgress value) => told.Add(value);
    }
}
