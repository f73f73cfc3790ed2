using ChainSolve.Tests.Shared.Chains;
using FsCheck.Xunit;

namespace ChainSolve.Numerics.Tests.Properties;

/// <summary>The laws of the transition function on thousands of random chains.</summary>
[Trait("Category", "Long")]
public class TransientLongPropertyTests
{
    [Property(MaxTest = 3000, Arbitrary = [typeof(StiffChains)])]
    public void RandomChain_RowsAddToOne(RandomChain chain) => TransientLaws.RowsAddToOne(chain);

    [Property(MaxTest = 3000, Arbitrary = [typeof(StiffChains)])]
    public void RandomChain_AtTimeZero_IsTheStart(RandomChain chain) => TransientLaws.AtZeroIsTheStart(chain);

    [Property(MaxTest = 3000, Arbitrary = [typeof(StiffChains)])]
    public void RandomChain_TwoSteps_AreOne(RandomChain chain) => TransientLaws.StepsCompose(chain);

    [Property(MaxTest = 3000, Arbitrary = [typeof(StiffChains)])]
    public void RandomChain_UnsortedGrid_IsOneByOne(RandomChain chain) => TransientLaws.GridIsOneByOne(chain);

    [Property(MaxTest = 3000, Arbitrary = [typeof(MildChains)])]
    public void RandomChain_UniformizationAndSquaring_Agree(RandomChain chain) => TransientLaws.MethodsAgree(chain);

    [Property(MaxTest = 3000, Arbitrary = [typeof(SmoothChains)])]
    public void RandomChain_Total_IsTheIntegralOfTheRate(RandomChain chain) => TransientLaws.TotalIsTheIntegral(chain);

    [Property(MaxTest = 3000, Arbitrary = [typeof(StiffChains)])]
    public void RandomChain_OtherNumbers_SameAnswers(RandomChain chain) => TransientLaws.RenumberingRenumbers(chain);

    [Property(MaxTest = 3000, Arbitrary = [typeof(StiffChains)])]
    public void TwoStates_RatesExchanged_StatesExchanged(RandomChain chain) => TransientLaws.ExchangedRatesExchangeStates(chain);

    [Property(MaxTest = 3000, Arbitrary = [typeof(StiffChains)])]
    public void RandomChain_OtherUnitOfTime_SameAnswers(RandomChain chain) => TransientLaws.ScaledTimeChangesNothing(chain);
}
