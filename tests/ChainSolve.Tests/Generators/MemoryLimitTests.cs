namespace ChainSolve.Tests.Generators;

public class MemoryLimitTests
{
    private const string Lattice = """
        model "Five benches"
        item a x 15 {
            up -> down at 0.01 per h
            down -> up at 0.2 per h
        }
        item b x 15 {
            up -> down at 0.01 per h
            down -> up at 0.2 per h
        }
        item c x 15 {
            up -> down at 0.01 per h
            down -> up at 0.2 per h
        }
        item d x 15 {
            up -> down at 0.01 per h
            down -> up at 0.2 per h
        }
        measure down = probability a.up < 3 at 1 h
        """;

    [Theory]
    [InlineData(100_000, "^[0-9,]+ states were found so far and take [0-9.]+ MB, more than the 0.1 MB allowed; raise the limit \\(MaxMemory, --max-memory\\) or write alike things as one item with 'x N'$")]
    [InlineData(8_000_000, "^65,536 states with 491,520 transitions need at least [0-9.]+ MB, more than the 8 MB allowed; raise the limit \\(MaxMemory, --max-memory\\) or write alike things as one item with 'x N'$")]
    public void Solve_InTooLittleMemory_SaysWhatWouldBeNeeded(long most, string message)
    {
        var model = Model.Parse(Lattice);
        foreach (var threads in new[] { 1, 2 })
        {
            var failure = Assert.Throws<LimitExceededException>(() => model.Solve(new SolveOptions { MaxMemory = most, Threads = threads }));
            Assert.Equal("memory", failure.Limit);
            Assert.Matches(message, failure.Message);
        }

        Assert.Single(model.Solve(new SolveOptions { MaxMemory = 100_000_000 }).Measures);
    }

    [Fact]
    public void Solve_WithoutMemory_IsRefused() =>
        Assert.Throws<ArgumentOutOfRangeException>(() => Model.Parse(Lattice).Solve(new SolveOptions { MaxMemory = 0 }));
}
