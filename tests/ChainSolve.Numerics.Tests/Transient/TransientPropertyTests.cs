using ChainSolve.Numerics.Tests.Properties;
using ChainSolve.Tests.Shared.Chains;
using FsCheck.Xunit;

namespace ChainSolve.Numerics.Tests.Transient;

/// <summary>The laws of the transition function on random chains, for every method.</summary>
public class TransientPropertyTests
{
    [Property(MaxTest = 200, Arbitrary = [typeof(StiffChains)])]
    public void AnyChain_Rows_AddToOne(RandomChain chain) => TransientLaws.RowsAddToOne(chain);

    [Property(MaxTest = 200, Arbitrary = [typeof(StiffChains)])]
    public void AnyChain_AtTimeZero_IsAtItsStart(RandomChain chain) => TransientLaws.AtZeroIsTheStart(chain);

    [Property(MaxTest = 200, Arbitrary = [typeof(StiffChains)])]
    public void AnyChain_TwoSteps_Compose(RandomChain chain) => TransientLaws.StepsCompose(chain);

    [Property(MaxTest = 200, Arbitrary = [typeof(StiffChains)])]
    public void AnyChain_AGridOfTimes_IsTheTimesOneByOne(RandomChain chain) => TransientLaws.GridIsOneByOne(chain);

    [Property(MaxTest = 200, Arbitrary = [typeof(MildChains)])]
    public void MildChain_AllMethods_Agree(RandomChain chain) => TransientLaws.MethodsAgree(chain);

    [Property(MaxTest = 200, Arbitrary = [typeof(SmoothChains)])]
    public void SmoothChain_Total_IsTheIntegralOfTheMean(RandomChain chain) => TransientLaws.TotalIsTheIntegral(chain);

    [Property(MaxTest = 200, Arbitrary = [typeof(StiffChains)])]
    public void AnyChain_OtherNumbers_SameAnswers(RandomChain chain) => TransientLaws.RenumberingRenumbers(chain);

    [Property(MaxTest = 200, Arbitrary = [typeof(StiffChains)])]
    public void TwoStates_ExchangedRates_ExchangeTheStates(RandomChain chain) => TransientLaws.ExchangedRatesExchangeStates(chain);

    [Property(MaxTest = 200, Arbitrary = [typeof(StiffChains)])]
    public void AnyChain_OtherUnitOfTime_SameAnswers(RandomChain chain) => TransientLaws.ScaledTimeChangesNothing(chain);
}
