using ChainSolve.Cli.Commands;
using ChainSolve.Cli.Tests.Support;

namespace ChainSolve.Cli.Tests.WholeProcess;

/// <summary>Machines with narrower vectors, or with none, give the same digits.</summary>
public class InstructionSetTests
{
    [Theory]
    [InlineData("EnableAVX512")]
    [InlineData("EnableAVX2")]
    [InlineData("EnableHWIntrinsic")]
    public async Task Solve_WithoutAnInstructionSet_SameDigits(string instructions)
    {
        string[] words = ["solve", "models/05-cold-store.chain", "--format", "csv", "--quiet", "--method", "transient=uniformization", "--measure", "cost_month", "--measure", "season"];
        var usual = await OwnProcess.RunAsync(words);
        var without = await OwnProcess.RunAsync(words, settings: [($"DOTNET_{instructions}", "0")]);

        Assert.Equal(ExitCodes.Done, usual.ExitCode);
        Assert.Equal(usual, without);
    }
}
