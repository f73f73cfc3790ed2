namespace ChainSolve.Tests.Binding;

public sealed class LetTests
{
    private const string Fan = "item fan x 2 { on -> off at 2 per y ; off -> on at 1/9 h }\n";

    [Fact]
    public void Bind_Circle_IsShown() =>
        Assert.Equal(
            ["2:5 B210 these lets lean on each other in a circle: a -> b -> c -> a"],
            Bound.Faults(Fan + "let a = b + 1\nlet b = c\nlet c = max(a, 2)\nlet d = a"));

    [Fact]
    public void Bind_LetOfItself_IsACircle() =>
        Assert.Equal(["2:5 B210 these lets lean on each other in a circle: a -> a"], Bound.Faults(Fan + "let a = a + 1"));

    [Fact]
    public void Bind_FunctionsInACircle_AreShown() =>
        Assert.Equal(
            ["2:5 B210 these lets lean on each other in a circle: f -> g -> f"],
            Bound.Faults(Fan + "let f(x) = g(x)\nlet g(x) = f(x) + 1\nlet h = f(2)"));

    [Fact]
    public void Bind_TwoCircles_AreTwoFaults() =>
        Assert.Equal(2, Bound.Faults(Fan + "let a = b\nlet b = a\nlet c = d\nlet d = c").Length);

    [Fact]
    public void Bind_ParameterNamedLikeALet_IsNoCircle() =>
        Assert.Equal(6, Bound.Probe(Fan + "let a = f(3)\nlet f(a) = 2 * a\nlet probe = a"));

    [Fact]
    public void Bind_FunctionOfDimensions_FollowsItsArguments() =>
        Assert.Equal(72 + 6, Bound.Probe(Fan + "let twice(x) = 2 * x\nlet probe = twice(36 h) / 1 h + twice(3)"));

    [Fact]
    public void Bind_FunctionOfAConditionOfTheState_IsOne() =>
        Assert.Equal(5, Bound.Probe(Fan + "let pick(c, x) = if c then x else 0\nlet probe = pick(fan.on > 1, 5)", ("fan.on", 2)));

    [Fact]
    public void Bind_SameLetTwice_IsOneNode()
    {
        var model = Bound.Model(Fan + "let a = fan.on + 3\nlet f(x) = x + 1\nmeasure m = expected a steady\nmeasure n = expected a steady\nmeasure o = expected f(a) steady\nmeasure p = expected f(a) steady");

        Assert.Same(model.Measures[0].Object!.Rate, model.Measures[1].Object!.Rate);
        Assert.Same(model.Measures[2].Object!.Rate, model.Measures[3].Object!.Rate);
    }

    [Fact]
    public void Bind_ChainOfTenThousandLets_IsBound()
    {
        var lets = string.Join("\n", Enumerable.Range(1, 10_000).Select(i => $"let a{i - 1} = a{i} + fan.on"));

        Assert.Equal(10_003, Bound.Probe($"{Fan}{lets}\nlet a10000 = 3\nlet probe = a0", ("fan.on", 1)));
    }

    [Fact]
    public void Bind_ChainOfTenThousandFunctions_IsBound()
    {
        var lets = string.Join("\n", Enumerable.Range(1, 10_000).Select(i => $"let f{i - 1}(x) = f{i}(x) + 1"));

        Assert.Equal(10_001, Bound.Probe($"{Fan}{lets}\nlet f10000(x) = x\nlet probe = f0(fan.on)", ("fan.on", 1)));
    }

    [Fact]
    public void Bind_ChainOfFunctionsWithDeepBrackets_IsBound()
    {
        var deep = new string('(', 100);
        var lets = string.Join("\n", Enumerable.Range(1, 1_000).Select(i => $"let f{i - 1}(x) = {deep}f{i}(x) + 1{deep.Replace('(', ')')}"));

        Assert.Equal(1_001, Bound.Probe($"{Fan}{lets}\nlet f1000(x) = x\nlet probe = f0(fan.on)", ("fan.on", 1)));
    }

    [Fact]
    public void Bind_FunctionsThatDouble_StayShared()
    {
        var lets = string.Join("\n", Enumerable.Range(1, 40).Select(i => $"let f{i}(x) = f{i - 1}(x) + f{i - 1}(x)"));

        Assert.Equal(Math.Pow(2, 40), Bound.Probe($"{Fan}let f0(x) = x\n{lets}\nlet probe = f40(fan.on)", ("fan.on", 1)));
    }

    [Fact]
    public void Bind_FunctionsThatExpandTooFar_AreAFault()
    {
        var lets = string.Join("\n", Enumerable.Range(1, 40).Select(i => $"let f{i}(x) = f{i - 1}(x + 1) + f{i - 1}(x + 2)"));

        var fault = Assert.Single(Bound.Faults($"{Fan}let f0(x) = x\n{lets}\nlet probe = f40(fan.on)"));
        Assert.EndsWith("B214 the functions called here expand to more than 100000 calls; name a common part with a let without parameters", fault, StringComparison.Ordinal);
    }

    [Fact]
    public void Bind_FunctionNeverCalled_HasItsNamesChecked() =>
        Assert.Equal(["2:18 B204 unknown name 'nowhere'"], Bound.Faults(Fan + "let f(x) = x + 2*nowhere"));

    [Fact]
    public void Bind_UnitsInAFunction_AreCheckedAtEachCall() =>
        Assert.Equal(
            ["2:18 B230 these cannot be added or subtracted: '3 h' is a time and 'x' is a plain number; a unit such as 'h' is missing"],
            Bound.Faults(Fan + "let f(x) = 3 h + x\nlet good = f(2 h)\nlet bad = f(2)"));
}
