using ChainSolve.Numerics.Estimates;
using ChainSolve.Numerics.Iteration;
using ChainSolve.Numerics.Kernels;
using ChainSolve.Numerics.Operators;
using ChainSolve.Numerics.Tests.Checks;
using ChainSolve.Numerics.Tests.Support;
using ChainSolve.Numerics.Transient;
using ChainSolve.Tests.Shared.Reference;

namespace ChainSolve.Numerics.Tests.Transient;

public class TransientSolverTests
{
    public static TheoryData<string> Methods => [.. SolverCatalog.Transient.Select(s => s.Name)];

    [Theory]
    [MemberData(nameof(Methods))]
    public void Solve_OneState_StaysAndEarns(string method)
    {
        var problem = new TransientProblem { Generator = Chains.Of(1), Start = [1], Times = [0, 3], Rates = [[2]], Totals = [[2]], WantsDistributions = true };
        var result = Find(method).Solve(problem, SolveContext.Default);

        Assert.Equal([2, 2], result.Rates.Select(r => r[0].Value));
        Assert.Equal(Estimate.Zero, result.Totals[0][0]);
        Assert.Equal(6, result.Totals[1][0].Value);
        Assert.Equal([1], result.Distributions![1]);
    }

    [Theory]
    [MemberData(nameof(Methods))]
    public void Solve_NothingAlive_IsZeroForGood(string method)
    {
        var problem = new TransientProblem
        {
            Generator = Chains.Of(2, (0, 1, 1)),
            Start = [0.5, 0.5],
            Alive = [false, false],
            Times = [0, 1],
            Rates = [[1, 1]],
            Totals = [[1, 1]],
            WantsDistributions = true,
        };
        var result = Find(method).Solve(problem, SolveContext.Default);

        Assert.All(result.Rates.Concat(result.Totals), r => Assert.Equal([Estimate.Zero], r));
        Assert.All(result.Distributions!.Concat(result.DistributionBounds!), d => Assert.Equal([0, 0], d));
    }

    [Theory]
    [MemberData(nameof(Methods))]
    public void Solve_AStartThatIsAbsorbing_StaysThere(string method)
    {
        var problem = new TransientProblem
        {
            Generator = Chains.Of(3, (0, 1, 1), (1, 2, 1)),
            Start = [0, 0, 1],
            Times = [5],
            Rates = [[1, 0, 0], [0, 0, 1]],
            WantsDistributions = true,
        };
        var result = Find(method).Solve(problem, SolveContext.Default);

        Assert.Equal(Estimate.Zero, result.Rates[0][0]);
        Assert.Equal(1, result.Rates[0][1].Value);
        Assert.Equal([0, 0, 1], result.Distributions![0]);
        Assert.Equal([0, 0], result.DistributionBounds![0][..2]);
    }

    [Theory]
    [MemberData(nameof(Methods))]
    public void Solve_AStateBehindARateOfZero_IsZero(string method)
    {
        var chain = Chains.Of(3, (0, 1, 1), (1, 2, 1)).WithRates([1, 0]);
        var problem = new TransientProblem { Generator = chain, Start = [1, 0, 0], Times = [1], Rates = [[0, 0, 1]], Totals = [[0, 0, 1]] };
        var result = Find(method).Solve(problem, SolveContext.Default);

        Assert.Equal((Estimate.Zero, Estimate.Zero), (result.Rates[0][0], result.Totals[0][0]));
    }

    [Theory]
    [MemberData(nameof(Methods))]
    public void Solve_TimesUnsortedAndRepeated_AnswersInTheirOrder(string method)
    {
        var problem = new TransientProblem { Generator = Chains.Of(2, (0, 1, 1), (1, 0, 2)), Start = [1, 0], Times = [3, 0.5, 0, 3, 0.25], Totals = [[0, 1]] };
        var result = Find(method).Solve(problem, SolveContext.Default);
        double[] values = [.. result.Totals.Select(t => t[0].Value)];

        Assert.Equal(values[0], values[3]);
        Assert.Equal(0, values[2]);
        Assert.True(values[4] < values[1] && values[1] < values[0]);
    }

    [Theory]
    [MemberData(nameof(Methods))]
    public void Solve_StatesThatDoNotCount_LoseWhatEntersThem(string method)
    {
        // One unit that fails at 2 and is repaired, watched until the first failure: survival is e^-2t.
        var problem = new TransientProblem
        {
            Generator = Chains.Of(2, (0, 1, 2), (1, 0, 1e6)),
            Start = [0.75, 0.25],
            Alive = [true, false],
            Times = [0.1, 40],
            Rates = [[1, 1]],
            Totals = [[1, 0]],
        };
        var result = Find(method).Solve(problem, SolveContext.Default);

        Assert.InRange(Chains.Distance(result.Rates[0][0].Value, 0.75 * ClosedForms.Decay(2 * (BigFloat)0.1)), 0, 1.1e-15);
        Assert.InRange(Chains.Distance(result.Rates[1][0].Value, 0.75 * ClosedForms.Decay(80)), 0, 1.1e-15);
        Assert.InRange(Chains.Distance(result.Totals[1][0].Value, 0.75 * ClosedForms.Rise(80) / 2), 0, 1.1e-15);
    }

    [Theory]
    [MemberData(nameof(Methods))]
    public void Solve_WrongArguments_NamesThem(string method)
    {
        var good = new TransientProblem { Generator = Chains.Of(2, (0, 1, 1)), Start = [1, 0], Times = [1] };
        var solver = Find(method);
        void Refuses(TransientProblem problem, string name) =>
            Assert.Equal(name, Assert.Throws<ArgumentException>(() => solver.Solve(problem, SolveContext.Default)).ParamName);

        Refuses(good with { Start = [1] }, "Start");
        Refuses(good with { Times = [-1] }, "Times");
        Refuses(good with { Times = [double.PositiveInfinity] }, "Times");
        Refuses(good with { Alive = [true] }, "Alive");
        Refuses(good with { Rates = [[1, -1]] }, "Rates");
        Refuses(good with { Totals = [[1, double.NaN]] }, "Totals");
        Assert.Contains("another unit", Assert.Throws<NotConvergedException>(
            () => solver.Solve(good with { Totals = [[1e300, 0]] }, SolveContext.Default)).Message, StringComparison.Ordinal);
        Assert.Contains("another unit", Assert.Throws<NotConvergedException>(
            () => solver.Solve(good with { Generator = Chains.Of(2, (0, 1, 1e-290)) }, SolveContext.Default)).Message, StringComparison.Ordinal);
    }

    [Theory]
    [MemberData(nameof(Methods))]
    public void Solve_Cancelled_Throws(string method) => Assert.Throws<OperationCanceledException>(() => Find(method).Solve(
        new TransientProblem { Generator = Chains.Of(2, (0, 1, 1), (1, 0, 1)), Start = [1, 0], Times = [1] },
        new SolveContext { Cancellation = new CancellationToken(true) }));

    [Theory]
    [MemberData(nameof(Methods))]
    public void Solve_WithProgress_Reports(string method)
    {
        var reports = new Reports();
        var problem = new TransientProblem { Generator = Chains.Of(2, (0, 1, 1), (1, 0, 1)), Start = [1, 0], Times = [10] };
        Find(method).Solve(problem, new SolveContext { Progress = reports });

        Assert.All(reports.All, r => Assert.Equal(method, r.Stage));
        Assert.NotEmpty(reports.All);
    }

    [Fact]
    public void Solve_HardChains_AgreesWithTheReference()
    {
        // A slow leak that looks like a steady state; a unit of 1e-12 and 1; three units of which one must hold.
        (int, int, double)[] leak = [(0, 1, 1), (1, 0, 1), (0, 2, 1e-10)];
        (int, int, double)[] unit = [(0, 1, 1e-12), (1, 0, 1)];
        (int, int, double)[] three = [(0, 1, 3e-6), (1, 2, 2e-6), (2, 3, 1e-6), (1, 0, 1), (2, 1, 1)];
        foreach (var (moves, time) in new[] { (leak, 1e10), (unit, 1e13), (three, 0.01), (three, 1e16), (three, 1e18) })
        {
            var count = 1 + moves.Max(m => Math.Max(m.Item1, m.Item2));
            var start = Chains.StartAt(count, 0);
            var problem = new TransientProblem { Generator = Chains.Of(count, moves), Start = start, Times = [time], WantsDistributions = true };
            var truth = new ReferenceChain(count, moves).Distribution(start, time);
            var choice = TransientSolvers.Select(problem);
            Assert.Equal("squaring", choice.Solver.Name);
            var result = choice.Solver.Solve(problem, SolveContext.Default);
            for (var i = 0; i < count; i++)
            {
                Assert.InRange(Chains.Distance(result.Distributions![0][i], truth[i]), 0, 1.2e-16);
            }
        }
    }

    [Fact]
    public void Solve_InOneDouble_StaysWithinItsBoundAndKeepsTheMass()
    {
        var chain = Chains.Lattice([4, 3], (a, l) => 0.3 + (0.1 * a) + (0.01 * l), (a, l) => 1 + (0.2 * a * l));
        var start = Chains.StartAt(12, 0);
        foreach (var alive in new[] { null, Enumerable.Range(0, 12).Select(i => i != 11).ToArray() })
        {
            var problem = new TransientProblem
            {
                Generator = chain,
                Start = start,
                Alive = alive,
                Times = [3, 400, 20_000],
                Rates = [start],
                Totals = [start],
                WantsDistributions = true,
            };
            var reached = ReachedChain.Reach(chain, start, alive);
            var plain = new UniformizationPass(problem, reached, isWide: false, new RowKernel(chain.Columns), SolveContext.Default).Run();
            var exact = new SquaringSolver().Solve(problem, SolveContext.Default);
            for (var t = 0; t < 3; t++)
            {
                Assert.Contains("one double", plain.How, StringComparison.Ordinal);
                Assert.InRange(Math.Abs(plain.Rates[t][0].Value - exact.Rates[t][0].Value), 0, plain.Rates[t][0].Bound);
                Assert.InRange(Math.Abs(plain.Totals[t][0].Value - exact.Totals[t][0].Value), 0, plain.Totals[t][0].Bound);
                for (var i = 0; i < 12; i++)
                {
                    Assert.InRange(Math.Abs(plain.Distributions![t][i] - exact.Distributions![t][i]), 0, plain.DistributionBounds![t][i] + exact.DistributionBounds![t][i]);
                    Assert.InRange(plain.DistributionBounds![t][i], 0, exact.Distributions[t][i] * problem.Times[t] * 1e-13);
                }

                if (alive is null)
                {
                    Assert.Equal(1, plain.Distributions![t].Sum(), 1e-14);
                }
            }
        }
    }

    [Fact]
    public void Solve_ALargeChainWithTimeZero_IsAtItsStart()
    {
        var chain = Chains.Lattice([80, 80], (_, _) => 1, (_, _) => 2);
        var start = Chains.StartAt(chain.StateCount, 5);
        var problem = new TransientProblem { Generator = chain, Start = start, Times = [0, 0.1], Rates = [start], Totals = [start], WantsDistributions = true };
        var choice = TransientSolvers.Select(problem);
        var result = choice.Solver.Solve(problem, SolveContext.Default);

        Assert.Equal("uniformization", choice.Solver.Name);
        Assert.Equal(start, result.Distributions![0]);
        Assert.Equal((1, Estimate.Zero), (result.Rates[0][0].Value, result.Totals[0][0]));
        Assert.InRange(result.Rates[1][0].Value, Math.Exp(-0.1 * chain.ExitRate(5)), 1);
        Assert.Contains("up to 3000", Assert.Throws<NotConvergedException>(
            () => new SquaringSolver().Solve(problem, SolveContext.Default)).Message, StringComparison.Ordinal);
    }

    [Fact]
    public void Solve_OnTwoThreadsAndWithVectors_HasTheSameDigits()
    {
        var chain = Chains.Lattice([400, 300], (a, l) => 0.3 + (0.1 * a) + (0.01 * l), (a, l) => 1 + (0.2 * a * l));
        var start = Chains.StartAt(chain.StateCount, 777);
        double[] reward = [.. Enumerable.Range(0, chain.StateCount).Select(i => (double)(i % 7))];
        foreach (var wide in new[] { false, true })
        {
            var problem = new TransientProblem { Generator = chain, Start = start, Times = [0.02], Rates = [reward, start], Totals = [reward] };
            var reached = ReachedChain.Reach(chain, start, null);
            var one = new UniformizationPass(problem, reached, wide, new RowKernel(chain.Columns), SolveContext.Default).Run();
            var two = new UniformizationPass(
                problem, reached, wide, StepKernels.For(chain.Columns, reached, 1000, CancellationToken.None), new SolveContext { Threads = 2 }).Run();

            Assert.Equal(one.Rates[0], two.Rates[0]);
            Assert.Equal(one.Totals[0], two.Totals[0]);
        }
    }

    [Fact]
    public void SquaringRun_AskedAgain_GivesWhatASingleAnswerGives()
    {
        var problem = new TransientProblem { Generator = Chains.Of(3, (0, 1, 1), (1, 0, 0.3), (1, 2, 1e-5)), Start = [1, 0, 0], Times = [], Rates = [[0, 0, 1]], Totals = [[0, 1, 0]] };
        var run = new SquaringRun(problem, keepsAll: true);
        foreach (var time in new[] { 1e6, 3.7, 0.01, 0, 5e8 })
        {
            var alone = new SquaringSolver().Solve(problem with { Times = [time] }, SolveContext.Default);
            var again = run.At([time], SolveContext.Default);
            Assert.Equal(alone.Rates[0], again.Rates[0]);
            Assert.Equal(alone.Totals[0], again.Totals[0]);
        }
    }

    [Fact]
    public void Select_BySizeAndTime_GivesItsReason()
    {
        TransientProblem Problem(Generator chain, double time) => new() { Generator = chain, Start = Chains.StartAt(chain.StateCount, 0), Times = [time], Rates = [new double[chain.StateCount]] };
        var grid = Chains.Lattice([30, 30], (_, _) => 1, (_, _) => 1);

        Assert.Equal("squaring", TransientSolvers.Select(Problem(Chains.Of(2, (0, 1, 1), (1, 0, 1)), 1e20)).Solver.Name);
        Assert.Equal("uniformization", TransientSolvers.Select(Problem(grid, 3)).Solver.Name);
        Assert.Contains("least work", TransientSolvers.Select(Problem(grid, 3)).Why, StringComparison.Ordinal);
        Assert.Equal("asked for by name", TransientSolvers.Select(Problem(grid, 3), "squaring").Why);
        Assert.Contains("squaring, uniformization, krylov", Assert.Throws<ArgumentException>(
            () => TransientSolvers.Select(Problem(grid, 3), "guessing")).Message, StringComparison.Ordinal);
        Assert.Equal("uniformization", TransientSolvers.Select(Problem(Chains.Lattice([100, 100], (_, _) => 1, (_, _) => 1), 1e12)).Solver.Name);
    }

    /// <summary>The order in which methods are tried, by size and by the number of events of the fastest state.</summary>
    [Theory]
    [InlineData(10, 1e2, "squaring uniformization krylov")]
    [InlineData(10, 1e16, "squaring uniformization krylov")]
    [InlineData(300, 10, "uniformization squaring krylov")]
    [InlineData(300, 1e4, "uniformization squaring krylov")]
    [InlineData(300, 1e9, "uniformization squaring krylov")]
    [InlineData(2500, 1e9, "uniformization krylov squaring")]
    [InlineData(40_000, 1e2, "uniformization krylov")]
    [InlineData(40_000, 1e7, "uniformization krylov")]
    public void Rank_BySizeAndEvents_TriesProofsFirst(int states, double events, string order)
    {
        var chain = Chains.Lattice([states / 10, 10], (_, _) => 1, (_, _) => 1);
        var problem = new TransientProblem { Generator = chain, Start = Chains.StartAt(chain.StateCount, 0), Times = [events / chain.MaxExitRate], Rates = [new double[chain.StateCount]] };
        Assert.Equal(order, string.Join(' ', TransientSolvers.Rank(problem, null, null).Select(c => c.Solver.Name)));
    }

    [Fact]
    public void Select_WithAMethodOfTheCaller_TakesTheCheapest()
    {
        var own = new Own();
        var problem = new TransientProblem { Generator = Chains.Of(2, (0, 1, 1)), Start = [1, 0], Times = [1] };
        var choice = TransientSolvers.Select(problem, null, [.. TransientSolvers.All, own]);

        Assert.Same(own, choice.Solver);
        Assert.Same(own, TransientSolvers.Select(problem, "own", [own]).Solver);
    }

    private static ITransientSolver Find(string name) => TransientSolvers.All.Single(s => s.Name == name);

    private sealed class Reports : IProgress<SolveProgress>
    {
        public List<SolveProgress> All { get; } = [];

        public void Report(SolveProgress value) => All.Add(value);
    }

    private sealed class Own : ITransientSolver
    {
        public string Name => "own";

        public double Cost(TransientProblem problem) => 1;

        public TransientResult Solve(TransientProblem problem, SolveContext context) => throw new NotConvergedException("not meant to be run");
    }
}
