using ChainSolve.Numerics.Tests.Support;
using ChainSolve.Numerics.Timeline;

namespace ChainSolve.Numerics.Tests.Timeline;

public class CourseTests
{
    private static readonly Segment Two = new(Chains.Of(2, (0, 1, 1)), 10);
    private static readonly Segment Three = new(Chains.Of(3, (0, 1, 1)), 5);

    [Fact]
    public void Find_ATime_GivesTheSegmentAfterTheJump()
    {
        var course = new Course([Two, Two with { Duration = 5 }, Two with { Duration = double.PositiveInfinity }], []);

        Assert.Equal((0, 0), course.Find(0));
        Assert.Equal((0, 9.5), course.Find(9.5));
        Assert.Equal((1, 0), course.Find(10));
        Assert.Equal((2, 85), course.Find(100));
        Assert.Equal(15, course.Begin(2));
        Assert.Equal(double.PositiveInfinity, course.End);
        Assert.Equal([null, null], course.Jumps);
    }

    [Fact]
    public void Find_OutsideOfTheCourse_Throws()
    {
        var course = new Course([Two], []);

        Assert.Equal((0, 10), course.Find(10));
        Assert.Throws<ArgumentOutOfRangeException>("time", () => course.Find(10.5));
        Assert.Throws<ArgumentOutOfRangeException>("time", () => course.Find(-1));
        Assert.Throws<ArgumentOutOfRangeException>("time", () => course.Find(double.NaN));
    }

    [Theory]
    [InlineData(0)]
    [InlineData(-1)]
    [InlineData(double.NaN)]
    [InlineData(double.PositiveInfinity)]
    public void New_ADurationThatIsNone_NamesTheSegment(double duration) => Assert.Contains(
        "Segment 0", Assert.Throws<ArgumentException>(() => new Course([Two with { Duration = duration }, Two], [])).Message, StringComparison.Ordinal);

    [Fact]
    public void New_PartsThatDoNotFit_SaysWhich()
    {
        Assert.Throws<ArgumentException>("segments", () => new Course([], []));
        Assert.Throws<ArgumentException>("jumps", () => new Course([Two, Two, Two], [null]));
        Assert.Contains("have 2 and 3 states", Assert.Throws<ArgumentException>(() => new Course([Two, Three], [])).Message, StringComparison.Ordinal);
        Assert.Contains("from 3 to 2", Assert.Throws<ArgumentException>(
            () => new Course([Two, Three], [Jump.Map([0, 1, 1], 2)])).Message, StringComparison.Ordinal);
        Assert.Single(new Course([Two, Three], [Jump.Map([0, 2], 3)]).Jumps);
    }
}
