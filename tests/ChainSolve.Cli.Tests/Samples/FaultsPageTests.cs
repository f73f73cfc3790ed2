using System.Reflection;
using ChainSolve.Cli.Tests.Support;
using ChainSolve.Language.Diagnostics;
using ChainSolve.Tests.Shared.Files;

namespace ChainSolve.Cli.Tests.Samples;

/// <summary>Keeps the page of faults and the codes together, and the page honest.</summary>
public class FaultsPageTests
{
    private static readonly string Page = Repository.Read("docs", "faults.md");

    public static TheoryData<string> Examples() =>
        new(MarkdownBlock.Read(Page).Select(block => CodeOf(block.Heading)).Distinct());

    [Fact]
    public void Page_Headings_AreTheCodesInOrder()
    {
        var codes = new[] { typeof(Diagnostic).Assembly, typeof(ModelFaultsException).Assembly }
            .SelectMany(assembly => assembly.GetTypes())
            .Select(type => type.GetProperty("All", BindingFlags.Static | BindingFlags.Public | BindingFlags.NonPublic))
            .Where(property => property is not null && property.PropertyType == typeof(IReadOnlyList<DiagnosticCode>))
            .SelectMany(property => (IReadOnlyList<DiagnosticCode>)property!.GetValue(null)!)
            .Select(code => $"{code.Code} {code.Title}")
            .ToList();
        var headings = Page.Split('\n').Where(line => line.StartsWith("## ", StringComparison.Ordinal)).Select(line => line[3..]).ToList();

        Assert.NotEmpty(codes);
        Assert.Equal(codes.Order(StringComparer.Ordinal), headings.Order(StringComparer.Ordinal));
        Assert.Equal(codes.Count, codes.Distinct().Count());
    }

    [Theory]
    [MemberData(nameof(Examples))]
    public async Task Page_FirstBlockOfACode_ProducesItAndTheSecondDoesNot(string code)
    {
        var blocks = MarkdownBlock.Read(Page).Where(block => CodeOf(block.Heading) == code).ToList();

        Assert.Contains(code, await CodesOfAsync(blocks[0].Text));
        foreach (var mended in blocks.Skip(1))
        {
            var outcome = await InProcess.RunAsync(mended.Text, ["solve", "-"]);
            Assert.DoesNotContain(code, Codes(outcome.Error));
        }
    }

    private static async Task<IEnumerable<string>> CodesOfAsync(string model) =>
        Codes((await InProcess.RunAsync(model, ["check", "-"])).Error).Concat(Codes((await InProcess.RunAsync(model, ["solve", "-"])).Error));

    private static IEnumerable<string> Codes(string error) => error
        .Split('\n')
        .Select(line => line.Split("  ", 3))
        .Where(parts => parts.Length == 3 && parts[1].Length == 4)
        .Select(parts => parts[1]);

    private static string CodeOf(string heading) => heading.Split(' ')[0];
}
