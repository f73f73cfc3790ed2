using ChainSolve.Binding;
using ChainSolve.Language.Parsing;

namespace ChainSolve.Tests.Binding;

public sealed class WarningTests
{
    private const string Fan = "item fan x 2 { on -> off at 2 per y named fail ; off -> on at 1/9 h }\n";

    [Fact]
    public void Bind_UnusedQuantities_AreWarnings()
    {
        var warnings = Bound.Warnings(
            Fan + "given a = 1\nlet b = 2\nlet f(x) = x\ncrew c = 1\nreward r = 3 per h\nitem big (l = 2) { on -> off at 1 per h }\nmeasure m = average fan.on steady");

        Assert.Equal(
            [
                "2:7 B301 nothing uses 'a', a given",
                "3:5 B301 nothing uses 'b', a let",
                "4:5 B301 nothing uses 'f', a function",
                "5:6 B301 nothing uses 'c', a crew",
                "6:8 B301 nothing uses 'r', a reward",
                "7:11 B301 nothing uses 'l', a local name of item 'big'",
            ],
            warnings);
    }

    [Fact]
    public void Bind_UsedQuantities_AreNoWarnings() =>
        Assert.Empty(Bound.Warnings(Fan + "given a = 1\nlet b = a\nreward r = 3 per h * b\nmeasure m = total r over 1 y"));

    [Fact]
    public void Bind_NoMeasures_DoesNotWarnOfWhatTheyWouldUse() =>
        Assert.Equal(["2:7 B301 nothing uses 'a', a given"], Bound.Warnings(Fan + "given a = 1\nlet b = 2\nreward r = 3 per h"));

    [Fact]
    public void Bind_FaultsPresent_LeavesWarningsOut() =>
        Assert.Equal(["3:9 B204 unknown name 'nowhere'"], Bound.Faults(Fan + "given a = 1\nlet b = nowhere"));

    [Fact]
    public void Bind_TextWithFaults_BlamesNoNameThatMayBeDeclaredThere()
    {
        var parsed = ModelParser.Parse(new("test.chain", "given a = ) 1\n" + Fan + "let b = a + 3 h\nlet c = 3 h + 1\nlet d = nowhere"));

        var result = Binder.Bind(parsed.Model);

        Assert.NotEmpty(parsed.Diagnostics);
        Assert.Null(result.Model);
        Assert.Equal(
            ["4:15 B230 these cannot be added or subtracted: '3 h' is a time and '1' is a plain number; write its unit, such as 1 h", "5:9 B204 unknown name 'nowhere'"],
            result.Diagnostics.Select(Bound.Show));
    }

    [Fact]
    public void Bind_TextWithFaultsAlone_GivesNoModelAndNoWarnings()
    {
        var parsed = ModelParser.Parse(new("test.chain", "given a = ) 1\ngiven b = 2\n" + Fan + "given c = a\nlet d = c"));

        var result = Binder.Bind(parsed.Model);

        Assert.Null(result.Model);
        Assert.Empty(result.Diagnostics);
    }

    [Fact]
    public void Codes_All_AreDifferentAndOrdered()
    {
        var codes = BindingCodes.All.Select(c => c.Code).ToList();

        Assert.Equal(codes.Distinct().Order(StringComparer.Ordinal), codes);
    }
}
