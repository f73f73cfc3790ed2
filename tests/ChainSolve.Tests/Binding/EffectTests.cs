using ChainSolve.Modelling;

namespace ChainSolve.Tests.Binding;

public sealed class EffectTests
{
    private const string Store = "item compressor x 2 { run -> broken at 1/60 d ; broken -> run at 1/8 h }\ncounter seals 0 .. 6 start 4\n";

    [Fact]
    public void Bind_Counter_HasRangeAndStart()
    {
        var model = Bound.Model("given top = 6\ncounter seals 1 .. top start 4\ncounter orders 2 .. 5");

        Assert.Equal([1, 6, 4], new[] { model.Counters[0].Low, model.Counters[0].High, model.Counters[0].Start }.Select(e => Bound.Value(model, e)));
        Assert.Equal(2, Bound.Value(model, model.Counters[1].Start));
        Assert.Equal([new BoundVariable(-1, 0, "seals"), new BoundVariable(-1, 1, "orders")], model.Variables);
    }

    [Fact]
    public void Bind_CounterRangeOfTheState_IsAFault() =>
        Assert.Equal(
            ["3:19 B212 'seals' depends on the state; the range of counter 'more' may use numbers and givens only"],
            Bound.Faults(Store + "counter more 0 .. seals"));

    [Fact]
    public void Bind_Event_HasItsOwnRate()
    {
        var model = Bound.Model(Store + "event deliver at 2 per h when seals <= 2 { seals = seals + 4 }");

        Assert.Equal(2, Bound.Rate(model, "event deliver", ("compressor.run", 2)));
        Assert.Equal(0, Bound.Rate(model, "event deliver", ("seals", 3)));
        var effect = Assert.IsType<AssignEffect>(Assert.Single(Bound.Transition(model, "event deliver").Effects));
        Assert.Equal(2, effect.Variable);
        Assert.Equal(5, Bound.Value(model, effect.Value, ("seals", 1)));
    }

    [Fact]
    public void Bind_EventWithoutEffects_IsAnOccurrence() =>
        Assert.Empty(Bound.Transition(Bound.Model(Store + "event ring at 2 per h { }"), "event ring").Effects);

    [Fact]
    public void Bind_MoveWithEffects_HasItsOwnFirst()
    {
        var model = Bound.Model("counter seals 0 .. 6\nitem compressor { run -> broken at 1/60 d ; broken -> run at 1/8 h { seals = seals - 1 } }");

        Assert.Collection(
            Bound.Transition(model, "move broken -> run of compressor").Effects,
            e => Assert.Equal(1, Assert.IsType<MoveEffect>(e).From),
            e => Assert.Equal(2, Assert.IsType<AssignEffect>(e).Variable));
    }

    [Theory]
    [InlineData("compressor: run -> broken", 1.0, false)]
    [InlineData("compressor: run -> broken x 2", 2.0, false)]
    [InlineData("compressor: run -> broken x (seals - 1)", 3.0, false)]
    [InlineData("compressor: run -> broken x 2 if any", 2.0, true)]
    [InlineData("compressor: run -> broken all", null, false)]
    [InlineData("compressor: run -> broken all if any", null, true)]
    public void Bind_ItemMove_CountsItsReplicas(string line, double? count, bool ifAny)
    {
        var model = Bound.Model($"{Store}event storm at 1 per y {{ {line} }}");

        var effect = Assert.IsType<MoveEffect>(Assert.Single(Bound.Transition(model, "event storm").Effects));
        Assert.Equal(count, effect.Count is null ? null : Bound.Value(model, effect.Count, ("seals", 4)));
        Assert.Equal(ifAny, effect.IfAny);
        Assert.Equal((0, 1), (effect.From, Assert.Single(effect.Targets).To));
    }

    [Fact]
    public void Bind_DrawnItemMove_KeepsTheProbabilities()
    {
        var model = Bound.Model(Store + "event storm at 1 per y { compressor: run -> broken 0.4, run 0.6 x 2 if any }");

        var effect = Assert.IsType<MoveEffect>(Assert.Single(Bound.Transition(model, "event storm").Effects));
        Assert.Equal([(1, 0.4), (0, 0.6)], effect.Targets.Select(t => (t.To, Bound.Value(model, t.Probability!))));
    }

    [Theory]
    [InlineData("seals = 1 ; seals = 2", "3:38 B250 counter 'seals' gets two values in one instant; put both changes into one line")]
    [InlineData("seal = 1", "3:26 B204 unknown counter 'seal'; nearest: 'seals'")]
    [InlineData("compressor = 1", "3:26 B205 'compressor' is an item; only counters take values")]
    [InlineData("seals = 1 h", "3:34 B231 the new value of 'seals' needs a plain number; '1 h' is a time")]
    [InlineData("seals: run -> broken", "3:26 B205 'seals' is a counter; only items have states to move between")]
    [InlineData("compressr: run -> broken", "3:26 B204 unknown item 'compressr'; nearest: 'compressor'")]
    [InlineData("compressor: run -> brokn", "3:45 B206 item 'compressor' has no state 'brokn'; it has run, broken; nearest: 'broken'")]
    [InlineData("compressor: run -> broken all ; compressor: run -> run all", "3:58 B251 another line moves all that are in 'run' already")]
    [InlineData("compressor: run -> broken x (1 h)", "3:54 B231 how many replicas move needs a plain number; '(1 h)' is a time")]
    public void Bind_WrongEffect_IsAFault(string line, string message) =>
        Assert.Equal([message], Bound.Faults($"{Store}event storm at 1 per y {{ {line} }}"));

    [Fact]
    public void Bind_TwoWrongLines_AreTwoFaults() =>
        Assert.Equal(
            ["3:26 B204 unknown counter 'seal'; nearest: 'seals'", "3:49 B206 item 'compressor' has no state 'rin'; it has run, broken; nearest: 'run'"],
            Bound.Faults(Store + "event storm at 1 per y { seal = 1 ; compressor: rin -> broken }"));

    [Fact]
    public void Bind_TransitionsStand_InTheOrderOfTheText() =>
        Assert.Equal(
            ["event a", "move on -> off of fan", "event b"],
            Bound.Model("event a at 1 per h { }\nitem fan { on -> off at 1 per h }\nevent b at 1 per h { }").Transitions.Select(t => t.Label));
}
