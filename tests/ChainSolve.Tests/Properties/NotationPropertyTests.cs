using ChainSolve.Tests.Shared.Chains;
using FsCheck.Xunit;

namespace ChainSolve.Tests.Properties;

/// <summary>Random models: what the text may not change, and every measure against the slow reference.</summary>
public class NotationPropertyTests
{
    [Property(MaxTest = 200, Arbitrary = [typeof(ModelSketches)])]
    public void ModelWithReplicas_AsSeparateItems_SameAnswers(ModelSketch sketch) => NotationLaws.ReplicasAreTheProduct(sketch);

    [Property(MaxTest = 200, Arbitrary = [typeof(ModelSketches)])]
    public void Model_OtherNamesAndOrder_SameAnswers(ModelSketch sketch) => NotationLaws.NamesAndOrderChangeNothing(sketch);

    [Property(MaxTest = 200, Arbitrary = [typeof(ModelSketches)])]
    public void Model_OtherUnitOfTime_SameDigits(ModelSketch sketch) => NotationLaws.ScaledTimeChangesNothing(sketch);

    [Property(MaxTest = 200, Arbitrary = [typeof(ModelSketches)])]
    public void Model_PrintedAndReadAgain_SameDigits(ModelSketch sketch) => NotationLaws.PrintedAndReadAgainIsTheSame(sketch);

    [Property(MaxTest = 200, Arbitrary = [typeof(SmallChains)])]
    public void RandomChain_AllMeasures_TruthWithinBounds(RandomChain chain) => NotationLaws.TruthIsWithinTheBounds(chain);
}
