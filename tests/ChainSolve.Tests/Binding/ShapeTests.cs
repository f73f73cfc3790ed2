namespace ChainSolve.Tests.Binding;

public sealed class ShapeTests
{
    private const string Body = " on -> off at 2 per y ; off -> on at 1/9 h }";

    [Theory]
    [InlineData("item fan x 2.5 {", "1:6 B246 item 'fan' comes out with 2.5 replicas; that has to be a whole number from 0")]
    [InlineData("item fan x (0 - 1) {", "1:6 B246 item 'fan' comes out with -1 replicas; that has to be a whole number from 0")]
    [InlineData("item fan x 3 { start on 2, off 2 ;", "1:6 B247 the start of item 'fan' adds up to 4, but it has 3 replicas")]
    [InlineData("item fan x 3 { start on 2.5, off 0.5 ;", "1:6 B247 2.5 replicas of item 'fan' start in 'on'; that has to be a whole number from 0")]
    [InlineData("item fan { start on 0.5, off 0.4 ;", "1:6 B247 the probabilities of the start of item 'fan' add up to 0.9, not to 1")]
    [InlineData("item fan { start on 1.5, off -0.5 ;", "1:6 B247 the probability that item 'fan' starts in 'on' is 1.5; it lies between 0 and 1")]
    public void Bind_ItemThatDoesNotAddUp_IsAFault(string head, string message) =>
        Assert.Equal([message], Bound.Faults(head + Body));

    [Theory]
    [InlineData("item fan x (3 + 1e-10) {")]
    [InlineData("item fan { start on 0.5, off 0.5000000001 ;")]
    public void Bind_ItemOffByRounding_IsFine(string head) => Assert.NotNull(Bound.Model(head + Body));

    [Theory]
    [InlineData("0.5, torn 0.4", "1:12 B248 the probabilities of these targets add up to 0.9, not to 1")]
    [InlineData("1.5, torn 0 - 0.5", "1:12 B248 the probability of a target is 1.5; it lies between 0 and 1")]
    public void Bind_TargetsThatDoNotAddUp_AreAFault(string targets, string message) =>
        Assert.Equal([message], Bound.Faults($"item fan {{ on -> off {targets} at 2 per y }}"));

    [Fact]
    public void Bind_TargetsThatReadTheState_AreJudgedLater() =>
        Assert.NotNull(Bound.Model("item fan x 2 { on -> off fan.on / 2, torn fan.off / 2 at 2 per y }"));

    [Theory]
    [InlineData("0 .. 2.5", "1:9 B252 the high end of counter 'stock' is 2.5; that has to be a whole number")]
    [InlineData("6 .. 2", "1:9 B252 the range of counter 'stock' begins at 6 and ends before that, at 2; exchange the ends")]
    [InlineData("0 .. 2 start 3", "1:9 B252 counter 'stock' starts at 3, outside its range 0 .. 2")]
    [InlineData("0 .. 2 start 1.5", "1:9 B252 the start of counter 'stock' is 1.5; that has to be a whole number")]
    public void Bind_CounterThatCannotBe_IsAFault(string range, string message) =>
        Assert.Equal([message], Bound.Faults("counter stock " + range));
}
