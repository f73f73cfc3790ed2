namespace ChainSolve.Tests.Binding;

public sealed class NameTests
{
    private const string Store = "item compressor x 2 { run -> broken at 1/60 d ; broken -> run at 1/8 h }\n";

    [Fact]
    public void Bind_MisspeltName_NamesTheNearest() =>
        Assert.Equal(
            ["2:29 B204 unknown name 'lamda'; nearest: 'lambda'"],
            Bound.Faults("given lambda = 2 per y\nitem fan { on -> off at 1 * lamda ; off -> on at 1/3 h }\nlet used = lambda"));

    [Fact]
    public void Bind_NameBeforeItsDeclaration_IsFound() =>
        Assert.Equal(3, Bound.Probe("let probe = twice + 1\nlet twice = 2\n" + Store));

    [Fact]
    public void Bind_NameOfAState_PointsToTheItem() =>
        Assert.Equal(
            ["2:12 B204 unknown name 'run'; meant is perhaps 'compressor.run'"],
            Bound.Faults(Store + "let cold = run >= 1"));

    [Fact]
    public void Bind_NameTwice_NamesTheFirst() =>
        Assert.Equal(
            ["3:5 B201 'cold' is already a given, declared on line 2; choose another name"],
            Bound.Faults(Store + "given cold = 2\nlet cold = 3"));

    [Fact]
    public void Bind_MeasureNamedLikeALet_IsAFault() =>
        Assert.Equal(
            ["3:9 B201 'cold' is already a let, declared on line 2; choose another name"],
            Bound.Faults(Store + "let cold = compressor.run > 0\nmeasure cold = probability cold steady"));

    [Fact]
    public void Bind_StatesAndMovesOfTwoItems_MayShareNames()
    {
        var model = Bound.Model("item a { on -> off at 1/3 h named on ; off -> on at 1/3 h }\nitem b { on -> off at 1/5 h named on ; off -> on at 1/3 h }");

        Assert.Equal(["a.on", "a.off", "b.on", "b.off"], model.Variables.Select(v => v.Name));
    }

    [Fact]
    public void Bind_Local_HidesTheTopLevel()
    {
        var model = Bound.Model("given fix = 9 h\nitem a (fix = 3 h), b (other = fix) { on -> off at 1/fix ; off -> on at 1/fix }\nlet use = 1");

        Assert.Equal(1.0 / 3, Bound.Rate(model, "move on -> off of a", ("a.on", 1)));
        Assert.Equal(1.0 / 9, Bound.Rate(model, "move on -> off of b", ("b.on", 1)));
    }

    [Fact]
    public void Bind_Parameter_HidesTheTopLevel() =>
        Assert.Equal(14, Bound.Probe("given n = 3\nlet f(n) = 2 * n\nlet probe = f(7)\n" + Store));

    [Fact]
    public void Bind_LocalAfterAnother_ReadsIt()
    {
        var model = Bound.Model("item a (fix = 3 h, slow = 2 * fix) { on -> off at 1/slow ; off -> on at 1/fix }");

        Assert.Equal(1.0 / 6, Bound.Rate(model, "move on -> off of a", ("a.on", 1)));
    }

    [Fact]
    public void Bind_LocalTwice_IsAFault() =>
        Assert.Equal(
            ["1:18 B201 the name 'f' stands twice in these brackets; choose another name"],
            Bound.Faults("item a (f = 3 h, f = 4 h) { on -> off at 1/f ; off -> on at 1/f }"));

    [Fact]
    public void Bind_ItemAsNumber_TellsHowToCount() =>
        Assert.Equal(
            ["2:12 B205 'compressor' is an item; how many of it are in a state is compressor.run"],
            Bound.Faults(Store + "let cold = compressor >= 1"));

    [Fact]
    public void Bind_RewardInAnExpression_IsAFault() =>
        Assert.Equal(
            ["3:14 B205 'loss' is a reward; a reward stands alone behind expected, average or total"],
            Bound.Faults(Store + "reward loss = 3 per h\nlet more = 2*loss"));

    [Fact]
    public void Bind_CrewAsNumber_IsAFault() =>
        Assert.Equal(
            ["3:9 B205 'fitter' is a crew; a number or a condition is needed here"],
            Bound.Faults(Store + "crew fitter = 2\nlet n = fitter"));

    [Fact]
    public void Bind_UnknownItem_NamesTheNearest() =>
        Assert.Equal(
            ["2:12 B204 unknown item 'compresor'; nearest: 'compressor'"],
            Bound.Faults(Store + "let cold = compresor.run >= 1"));

    [Fact]
    public void Bind_UnknownState_ListsTheStates() =>
        Assert.Equal(
            ["2:23 B206 item 'compressor' has no state 'ran'; it has run, broken; nearest: 'run'"],
            Bound.Faults(Store + "let cold = compressor.ran >= 1"));

    [Fact]
    public void Bind_StateOfSomethingElse_IsAFault() =>
        Assert.Equal(
            ["3:12 B205 'n' is a given; states belong to items"],
            Bound.Faults(Store + "given n = 1\nlet cold = n.run >= 1"));

    [Fact]
    public void Bind_UnitWordAsName_IsAName() =>
        Assert.Equal(12, Bound.Probe("given h = 3\nlet d = 4\nlet probe = h * d\n" + Store));

    [Fact]
    public void Bind_FunctionNamedLikeABuiltIn_IsTheOwnOne() =>
        Assert.Equal(8, Bound.Probe("let min(a) = 2 * a\nlet probe = min(4)\n" + Store));

    [Fact]
    public void Bind_FunctionWithoutArguments_TellsHowToCallIt() =>
        Assert.Equal(
            ["3:9 B205 'f' is a function; call it with its arguments: f(a, b)"],
            Bound.Faults(Store + "let f(a, b) = a + b\nlet g = f + 1"));

    [Fact]
    public void Bind_CallOfAGiven_IsAFault() =>
        Assert.Equal(
            ["3:9 B205 'n' is a given; it is not a function"],
            Bound.Faults(Store + "given n = 2\nlet g = n(1)"));

    [Fact]
    public void Bind_UnknownFunction_NamesTheNearest() =>
        Assert.Equal(
            ["2:9 B208 unknown function 'celi'; nearest: 'ceil'"],
            Bound.Faults(Store + "let g = celi(1)"));

    [Fact]
    public void Bind_WrongNumberOfArguments_TellsTheRightOne() =>
        Assert.Equal(
            [
                "3:9 B209 'f' takes 2 arguments, not 1",
                "4:9 B209 'sqrt' takes 1 argument, not 2",
                "5:9 B209 'choose' takes 2 arguments, not 3",
            ],
            Bound.Faults(Store + "let f(a, b) = a + b\nlet g = f(1)\nlet r = sqrt(1, 2)\nlet c = choose(1, 2, 3)"));

    [Fact]
    public void Bind_NeitherItemNorCounter_IsAFault() =>
        Assert.Equal(
            ["1:1 B203 the file has neither an item nor a counter; write what can be in which states, such as: item pump { up -> down at 1/900 h }"],
            Bound.Faults("given n = 3"));

    [Fact]
    public void Bind_ManyFaults_EndsAtTwenty()
    {
        var faults = Bound.Faults(Store + string.Join("\n", Enumerable.Range(0, 30).Select(i => $"let a{i} = nothing{i}x")));

        Assert.Equal(21, faults.Length);
        Assert.Equal("22:11 B299 10 more faults are not shown; the next one is here", faults[20]);
    }

    [Fact]
    public void Bind_TitleOrTimebaseTwice_IsAFault() =>
        Assert.Equal(
            ["3:1 B202 'model' may stand once; the first is on line 2", "5:1 B202 'timebase' may stand once; the first is on line 4"],
            Bound.Faults(Store + "model \"a\"\nmodel \"b\"\ntimebase d\ntimebase h"));
}
