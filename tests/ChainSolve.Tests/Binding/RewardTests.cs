using ChainSolve.Modelling;

namespace ChainSolve.Tests.Binding;

public sealed class RewardTests
{
    private const string Store = "item compressor x 2 { run -> broken at 1 per h named fail ; broken -> run at 4 per h named mend ; run -> run at 3 per h named tick }\ncounter seals 0 .. 6\nevent order at 2 per h when seals < 2 { seals = 6 }\n";

    private static Earning Earning(string reward) => Bound.Model(Store + reward).Rewards[0].Earning;

    private static double Rate(string reward, params (string Name, int Value)[] marking)
    {
        var model = Bound.Model(Store + reward);
        return Bound.Value(model, model.Rewards[0].Earning.Rate, marking);
    }

    [Fact]
    public void Bind_ShortReward_IsARateWhile()
    {
        const string reward = "reward r = 5 per h while compressor.run < 2";

        Assert.Equal(5, Rate(reward, ("compressor.run", 1)));
        Assert.Equal(0, Rate(reward, ("compressor.run", 2)));
    }

    [Fact]
    public void Bind_RateThatIsNotEarned_IsNotEvaluated() =>
        Assert.Equal(0, Rate("reward r = 5 per h / compressor.run while compressor.run > 0"));

    [Fact]
    public void Bind_Each_IsTheOccurrenceRateTimesTheAmount()
    {
        Assert.Equal(2 * 150, Rate("reward r { each compressor.fail 150 }", ("compressor.run", 2)));
        Assert.Equal(2, Rate("reward r { each compressor.fail }", ("compressor.run", 2)));
        Assert.Equal(2 * 7, Rate("reward r { each order 7 }", ("seals", 1)));
        Assert.Equal(0, Rate("reward r { each order 7 }", ("seals", 2)));
    }

    [Fact]
    public void Bind_EachOfASelfLoop_CountsIt() => Assert.Equal(6, Rate("reward r { each compressor.tick }", ("compressor.run", 2)));

    [Fact]
    public void Bind_EachWhile_ReadsTheStateBefore()
    {
        const string reward = "reward r { each compressor.fail 10 * compressor.run while compressor.broken = 0 }";

        Assert.Equal(2 * 20, Rate(reward, ("compressor.run", 2)));
        Assert.Equal(0, Rate(reward, ("compressor.run", 1), ("compressor.broken", 1)));
    }

    [Fact]
    public void Bind_AmountWhereNothingHappens_IsNotEvaluated() =>
        Assert.Equal(0, Rate("reward r { each compressor.fail 10 / compressor.run }", ("compressor.broken", 2)));

    [Fact]
    public void Bind_EachOfANameOnSeveralMoves_CountsAll()
    {
        var model = Bound.Model("item fan { on -> off at 2 per h named fault ; off -> torn at 3 per h named fault ; torn -> on at 4 per h }\nreward r { each fan.fault 10 }");

        Assert.Equal(20, Bound.Value(model, model.Rewards[0].Earning.Rate, ("fan.on", 1)));
        Assert.Equal(30, Bound.Value(model, model.Rewards[0].Earning.Rate, ("fan.off", 1)));
    }

    [Fact]
    public void Bind_EachUnderACrew_HasTheShareInIt()
    {
        var model = Bound.Model("crew c = 1\nitem fan x 2 { on -> off at 2 per h ; off -> on at 3 per h by c named mend }\nreward r { each fan.mend }");

        Assert.Equal(3, Bound.Value(model, model.Rewards[0].Earning.Rate, ("fan.off", 2)));
    }

    [Fact]
    public void Bind_SeveralLines_AddUp() =>
        Assert.Equal(
            7 + (2 * 4) + 6,
            Rate("reward r { rate 7 per h ; rate 4 per h * compressor.run ; each compressor.tick 1 }", ("compressor.run", 2)));

    [Theory]
    [InlineData("reward r = 1 while seals > 2", 0)]
    [InlineData("reward r = 5 per h", -1)]
    [InlineData("reward r { each order }", -1)]
    [InlineData("reward r { each order 2 h ; rate compressor.run }", 0)]
    [InlineData("reward r = 0", 0)]
    [InlineData("reward r { rate 0 ; each order 5 }", -1)]
    public void Bind_Reward_HasTheDimensionOfItsRate(string reward, int power) => Assert.Equal(power, Earning(reward).TimePower);

    [Fact]
    public void Bind_RewardIn_KeepsTheUnit() => Assert.Equal("EUR", Earning("reward r in \"EUR\" = 5 per h").Unit);

    [Theory]
    [InlineData("reward r { rate 5 ; each order 3 }", "4:21 B260 this line adds up to a plain number, but 'rate 5' to a time; a rate times time has the dimension of what is earned each time")]
    [InlineData("reward r { each order 3 ; rate 5 per h ; rate 1 per y * 2 h }", "4:42 B260 this line adds up to a time, but 'each order 3' to a plain number; a rate times time has the dimension of what is earned each time")]
    [InlineData("reward r { }", "4:8 B261 reward 'r' earns nothing; add a line with 'rate' or 'each'")]
    [InlineData("reward r { each compressor }", "4:17 B205 'compressor' is an item; name one of its moves, such as compressor.fail")]
    [InlineData("reward r { each compressor.fial }", "4:28 B207 item 'compressor' has no move named 'fial'; named are fail, mend, tick; nearest: 'fail'")]
    [InlineData("reward r { each ordr }", "4:17 B204 unknown event 'ordr'; nearest: 'order'")]
    [InlineData("reward r { each compresor.fail }", "4:17 B204 unknown item 'compresor'; nearest: 'compressor'")]
    [InlineData("reward r { each seals 3 }", "4:17 B205 'seals' is a counter; 'each' needs an event, or a move of an item as ITEM.MOVE")]
    [InlineData("reward r { each order.fail }", "4:17 B205 'order' is an event; moves belong to items")]
    [InlineData("reward r = 5 per h while 3", "4:26 B220 '3' is a number; 'while' needs a condition, such as a comparison")]
    public void Bind_WrongReward_IsAFault(string reward, string message) =>
        Assert.Equal([message], Bound.Faults(Store + reward));
}
