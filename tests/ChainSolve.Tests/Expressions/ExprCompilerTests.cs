using ChainSolve.Expressions;
using FsCheck.Xunit;

namespace ChainSolve.Tests.Expressions;

public class ExprCompilerTests
{
    [Property(MaxTest = 300)]
    public void Run_RandomGraphs_BothBackEndsGiveTheDigitsOfPlainRecursion(int seed)
    {
        var exprs = new RandomExprs(seed).Make(30);
        int[] marking = [seed & 3, 2, 7];
        double[] givens = [0.25, seed % 5];
        var expected = exprs.Select(e => DirectEvaluation.Of(e, marking, givens)).ToArray();
        foreach (var backEnd in Enum.GetValues<ExprBackEnd>())
        {
            var outputs = new double[exprs.Count];
            ExprCompiler.Compile(exprs, backEnd).Run(marking, givens, outputs);
            Assert.Equal(expected.Select(BitConverter.DoubleToInt64Bits).Select(Sign), outputs.Select(BitConverter.DoubleToInt64Bits).Select(Sign));
        }

        // All NaNs count as one: their payload is not defined.
        static long Sign(long bits) => double.IsNaN(BitConverter.Int64BitsToDouble(bits)) ? long.MinValue + 1 : bits;
    }

    [Theory]
    [InlineData(ExprBackEnd.Fastest)]
    [InlineData(ExprBackEnd.Compiled)]
    [InlineData(ExprBackEnd.Interpreted)]
    internal void Compile_DoublingLetChain_StaysLinear(ExprBackEnd backEnd)
    {
        NumberExpr sum = new VariableExpr(0);
        for (var i = 0; i < 60; i++)
        {
            sum = new SumExpr([new SumTerm(sum, false), new SumTerm(sum, false)]);
        }

        var outputs = new double[1];
        ExprCompiler.Compile([sum], backEnd).Run([1], [], outputs);
        Assert.Equal(Math.Pow(2, 60), outputs[0]);
    }

    [Theory]
    [InlineData(ExprBackEnd.Fastest)]
    [InlineData(ExprBackEnd.Interpreted)]
    internal void Compile_ChainOfHundredThousandNodes_DoesNotExhaustTheStack(ExprBackEnd backEnd)
    {
        NumberExpr value = new VariableExpr(0);
        for (var i = 0; i < 100_000; i++)
        {
            value = new SumExpr([new SumTerm(value, false), new SumTerm(new ConstantExpr(1), false)]);
        }

        var outputs = new double[1];
        ExprCompiler.Compile([value], backEnd).Run([5], [], outputs);
        Assert.Equal(100_005, outputs[0]);
    }

    [Fact]
    public void Run_Often_KeepsItsDigits()
    {
        var exprs = new RandomExprs(5).Make(30);
        var program = ExprCompiler.Compile(exprs);
        Assert.IsType<GrowingProgram>(program);
        var (first, later) = (new double[exprs.Count], new double[exprs.Count]);
        program.Run([1, 2, 7], [0.25, 3], first);
        for (var k = 0; k < 10_000; k++)
        {
            program.Run([1, 2, 7], [0.25, 3], later);
            Assert.Equal(first, later);
        }
    }

    [Fact]
    public void Run_OutputsTooShort_Throws()
    {
        var program = ExprCompiler.Compile([new ConstantExpr(1), new ConstantExpr(2)], ExprBackEnd.Compiled);
        Assert.Throws<ArgumentOutOfRangeException>(() => program.Run([], [], new double[1]));
    }

    [Theory]
    [InlineData(5, 2, 10)]
    [InlineData(5, 0, 1)]
    [InlineData(5, 6, 0)]
    [InlineData(5, -1, 0)]
    [InlineData(52, 26, 495918532948104)]
    [InlineData(2.5, 1, double.NaN)]
    [InlineData(-1, 1, double.NaN)]
    public void Choose_Numbers_CountsWays(double n, double k, double expected) => Assert.Equal(expected, ScalarMath.Choose(n, k));

    [Fact]
    public void Reads_SharedGraph_FindsGivensAndVariables()
    {
        var shared = new ProductExpr([new(new GivenExpr(1), false), new(new VariableExpr(2), true)]);
        var reads = ExprReads.Of([new SumExpr([new(shared, false), new(shared, true)]), new CompareExpr(Comparison.Less, shared, new VariableExpr(0))]);
        Assert.Equal([1], reads.Givens);
        Assert.Equal([0, 2], reads.Variables.Order());
    }
}
