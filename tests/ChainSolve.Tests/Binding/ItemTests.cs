using ChainSolve.Modelling;

namespace ChainSolve.Tests.Binding;

public sealed class ItemTests
{
    [Fact]
    public void Bind_StatesClause_FixesTheOrder() =>
        Assert.Equal(
            ["off", "on", "torn"],
            Bound.Model("item fan { states off, on, torn ; on -> off at 2 per y ; off -> on at 1/9 h }").Items[0].States);

    [Fact]
    public void Bind_NoStatesClause_IsOrderOfAppearance() =>
        Assert.Equal(
            ["on", "off", "torn"],
            Bound.Model("item fan { on -> off 0.5, torn 0.5 at 2 per y ; off -> on at 1/9 h }").Items[0].States);

    [Fact]
    public void Bind_MoveOutsideTheStatesClause_IsAFault() =>
        Assert.Equal(
            ["1:35 B206 item 'fan' has no state 'of'; it has on, off; nearest: 'off'"],
            Bound.Faults("item fan { states on, off ; on -> of at 2 per y }"));

    [Fact]
    public void Bind_StateListedTwice_IsAFault() =>
        Assert.Equal(["1:23 B241 state 'on' is listed twice"], Bound.Faults("item fan { states on, on ; on -> on at 2 per y }"));

    [Fact]
    public void Bind_StatesOrStartTwice_IsAFault() =>
        Assert.Equal(
            ["3:5 B202 'states' may stand once; the first is on line 2", "5:5 B202 'start' may stand once; the first is on line 4"],
            Bound.Faults("item fan {\n    states on, off\n    states off, on\n    start on\n    start off\n    on -> off at 2 per y\n}"));

    [Fact]
    public void Bind_ItemWithoutStates_IsAFault() =>
        Assert.Equal(["1:6 B240 item 'fan' has no states; write its moves, or list them: states a, b"], Bound.Faults("item fan { }"));

    [Fact]
    public void Bind_NoStart_IsAllInTheFirstState()
    {
        var model = Bound.Model("given n = 3\nitem fan x n { on -> off at 2 per y ; off -> on at 1/9 h }");

        Assert.True(model.Items[0].IsReplicated);
        Assert.Equal([3, 0], model.Items[0].Start.Select(s => Bound.Value(model, s)));
        Assert.Equal(3, Bound.Value(model, model.Items[0].Count));
    }

    [Fact]
    public void Bind_StartOfOneState_IsAllThere()
    {
        var model = Bound.Model("item fan x 3 { start off ; on -> off at 2 per y ; off -> on at 1/9 h }");

        Assert.Equal([0, 3], model.Items[0].Start.Select(s => Bound.Value(model, s)));
    }

    [Fact]
    public void Bind_StartWithCounts_KeepsThem()
    {
        var model = Bound.Model("item fan x 3 { start on 2, off 1 ; on -> off at 2 per y ; off -> on at 1/9 h }");

        Assert.Equal([2, 1], model.Items[0].Start.Select(s => Bound.Value(model, s)));
        Assert.False(model.Items[0].StartIsDrawn);
    }

    [Fact]
    public void Bind_StartWithProbabilities_IsDrawn()
    {
        var model = Bound.Model("item fan { start on 0.25, off 75 % ; on -> off at 2 per y ; off -> on at 1/9 h }");

        Assert.Equal([0.25, 0.75], model.Items[0].Start.Select(s => Bound.Value(model, s)));
        Assert.True(model.Items[0].StartIsDrawn);
        Assert.False(model.Items[0].IsReplicated);
    }

    [Fact]
    public void Bind_StartWithoutNumbers_AsksForThem() =>
        Assert.Equal(
            [
                "1:22 B242 how many start in 'on'? where several states are named each needs its count, such as on 1",
                "2:18 B242 how likely is a start in 'on'? where several states are named each needs its probability, such as on 0.5",
            ],
            Bound.Faults("item fan x 3 { start on, off 1 ; on -> off at 2 per y }\nitem big { start on, off 1 ; on -> off at 2 per y }"));

    [Fact]
    public void Bind_StartFromALocal_IsThatOfTheItem()
    {
        var model = Bound.Model("item a (s = 0.9), b (s = 50 %) { start on s, off 1 - s ; on -> off at 2 per y ; off -> on at 1/9 h }");

        Assert.Equal([0.9, 0.5], model.Items.Select(i => Bound.Value(model, i.Start[0])));
    }

    [Fact]
    public void Bind_StartOfTheState_IsAFault() =>
        Assert.Equal(
            ["1:34 B212 's' depends on the state; the start of item 'a' may use numbers and givens only"],
            Bound.Faults("item a x 3 (s = a.on) { start on s, off 1 ; on -> off at 2 per y }"));

    [Fact]
    public void Bind_StartInAnUnknownState_IsAFault() =>
        Assert.Equal(
            ["1:18 B206 item 'fan' has no state 'onn'; it has on, off; nearest: 'on'"],
            Bound.Faults("item fan { start onn ; on -> off at 2 per y }"));

    [Fact]
    public void Bind_CountZero_IsLegal() =>
        Assert.Equal(0, Bound.Value(Bound.Model("item fan x 0 { on -> off at 2 per y }"), Bound.Model("item fan x 0 { on -> off at 2 per y }").Items[0].Count));

    [Fact]
    public void Bind_CountOfTheState_IsAFault() =>
        Assert.Equal(
            ["2:13 B212 'fan.on' depends on the state; the count of item 'big' may use numbers and givens only"],
            Bound.Faults("item fan { on -> off at 2 per y }\nitem big x (fan.on) { on -> off at 2 per y }"));

    [Fact]
    public void Bind_Move_IsPerReplicaInTheSource()
    {
        var model = Bound.Model("item fan x 3 { on -> off at 2 per h ; off -> on at 1/9 h }");

        Assert.Equal(6, Bound.Rate(model, "move on -> off of fan", ("fan.on", 3)));
        var effect = Assert.IsType<MoveEffect>(Assert.Single(Bound.Transition(model, "move on -> off of fan").Effects));
        Assert.Equal(0, effect.From);
        Assert.Equal([new MoveTarget(1, null)], effect.Targets);
        Assert.Equal(1, Bound.Value(model, effect.Count!));
    }

    [Fact]
    public void Bind_RateThatReadsItsSource_IsNotLookedAtWithoutAReplica()
    {
        var model = Bound.Model("item fan x 3 { on -> off at 6 per h / fan.on ; off -> on at 1/9 h }");

        Assert.Equal(0, Bound.Rate(model, "move on -> off of fan", ("fan.off", 3)));
        Assert.Equal(6, Bound.Rate(model, "move on -> off of fan", ("fan.on", 2)));
    }

    [Fact]
    public void Bind_When_IsTheGuard()
    {
        var model = Bound.Model("item fan x 3 { on -> off at 2 per h when fan.off = 0 ; off -> on at 1/9 h }");

        Assert.Equal(4, Bound.Rate(model, "move on -> off of fan", ("fan.on", 2)));
        Assert.Equal(0, Bound.Rate(model, "move on -> off of fan", ("fan.on", 2), ("fan.off", 1)));
    }

    [Fact]
    public void Bind_DrawnTarget_KeepsTheProbabilities()
    {
        var model = Bound.Model("given p = 5 %\nitem fan { on -> off 1 - p, torn p at 2 per y ; off -> on at 1/9 h }");

        var effect = Assert.IsType<MoveEffect>(Assert.Single(model.Transitions[0].Effects));
        Assert.Equal([1, 2], effect.Targets.Select(t => t.To));
        Assert.Equal([0.95, 0.05], effect.Targets.Select(t => Bound.Value(model, t.Probability!)));
        Assert.Equal("move on -> off, torn of fan", model.Transitions[0].Label);
    }

    [Fact]
    public void Bind_AfterMean_IsTheRateOneOverIt()
    {
        var model = Bound.Model("item fan { on -> off after mean 4 h ; off -> on after mean 9 h }");

        Assert.Equal(0.25, Bound.Rate(model, "move on -> off of fan", ("fan.on", 1)));
    }

    [Fact]
    public void Bind_AfterMeanOfARate_IsAFault() =>
        Assert.Equal(
            ["1:33 B231 the mean delay of on -> off needs a time; '2 per y' is a rate (1/time); write 1/(2 per y)"],
            Bound.Faults("item fan { on -> off after mean 2 per y ; off -> on after mean 9 h }"));

    [Fact]
    public void Bind_TwoAfterOutOfOneState_IsAFault() =>
        Assert.Equal(
            ["3:19 B245 state 'on' is left by an 'after' already, and only one is possible; write this move with 'at'"],
            Bound.Faults("item fan {\n on -> off after mean 4 h\n on -> torn after mean 9 h\n}"));

    [Fact]
    public void Bind_SelfLoop_IsAPlainOccurrence()
    {
        var model = Bound.Model("item fan { on -> on at 2 per h named tick }");

        Assert.Empty(model.Transitions[0].Effects);
        Assert.Equal(2, Bound.Rate(model, "move on -> on of fan", ("fan.on", 1)));
    }

    [Fact]
    public void Bind_SelfLoopWithEffects_KeepsItsReplicaBusy()
    {
        var model = Bound.Model("item fan x 3 { on -> on at 2 per h { fan: on -> off all } ; off -> on at 1/9 h }");

        Assert.Equal(2, model.Transitions[0].Effects.Count);
        Assert.Null(Assert.IsType<MoveEffect>(model.Transitions[0].Effects[1]).Count);
    }

    [Fact]
    public void Bind_TwoMovesAlike_AreTwoTransitions() =>
        Assert.Equal(3, Bound.Model("item fan { on -> off at 2 per h ; on -> off at 3 per h ; off -> on at 1/9 h }").Transitions.Count);

    [Fact]
    public void Bind_SeveralItemsWithOneBody_AreBoundEach()
    {
        var model = Bound.Model("item mains (f = 3 per h), diesel x 2 (f = 8 per h) { on -> off at f ; off -> on at 1/9 h }");

        Assert.Equal(["mains", "diesel"], model.Items.Select(i => i.Name));
        Assert.Equal([false, true], model.Items.Select(i => i.IsReplicated));
        Assert.Equal(3, Bound.Rate(model, "move on -> off of mains", ("mains.on", 1)));
        Assert.Equal(16, Bound.Rate(model, "move on -> off of diesel", ("diesel.on", 2)));
    }

    [Fact]
    public void Bind_FaultInASharedBody_NamesTheItem() =>
        Assert.Equal(
            ["1:63 B231 item 'diesel': the rate of on -> off needs a rate (1/time); 'f' is a time; write 1/f"],
            Bound.Faults("item mains (f = 3 per h), diesel x 2 (f = 8 h) { on -> off at f ; off -> on at 1/9 h }"));

    [Fact]
    public void Bind_FaultThatAllItemsOfABodyShare_IsToldOnce() =>
        Assert.Equal(
            ["1:35 B204 item 'mains': unknown name 'f'"],
            Bound.Faults("item mains, diesel { on -> off at f ; off -> on at 1/9 h }"));

    [Fact]
    public void Bind_LocalThatReadsTheState_IsRead()
    {
        var model = Bound.Model("item fan x 3 (load = 1 + fan.off) { on -> off at load per h ; off -> on at 1/9 h }");

        Assert.Equal(4, Bound.Rate(model, "move on -> off of fan", ("fan.on", 2), ("fan.off", 1)));
    }

    [Fact]
    public void Bind_TargetsWithAndWithoutProbability_AskForThem() =>
        Assert.Equal(
            ["2:11 B243 how likely is 'off'? where several targets are named each needs its probability, such as off 0.5"],
            Bound.Faults("item fan {\n on    -> off, torn 0.5 at 2 per h\n}"));
}
