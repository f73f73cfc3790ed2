using ChainSolve.Tests.Shared.Chains;
using FsCheck.Xunit;

namespace ChainSolve.Numerics.Tests.Properties;

/// <summary>The laws of the stationary vector on random irreducible chains.</summary>
public class StationaryPropertyTests
{
    [Property(MaxTest = 200, Arbitrary = [typeof(IrreducibleChains)])]
    public void IrreducibleChain_AllMethods_Agree(RandomChain chain) => StationaryLaws.MethodsAgree(chain);

    [Property(MaxTest = 200, Arbitrary = [typeof(IrreducibleChains)])]
    public void IrreducibleChain_OtherNumbers_SameAnswers(RandomChain chain) => StationaryLaws.RenumberingRenumbers(chain);

    [Property(MaxTest = 200, Arbitrary = [typeof(IrreducibleChains)])]
    public void IrreducibleChain_OtherUnitOfTime_SameAnswers(RandomChain chain) => StationaryLaws.ScaledTimeChangesNothing(chain);

    [Property(MaxTest = 200, Arbitrary = [typeof(IrreducibleChains)])]
    public void IrreducibleChain_Flows_Balance(RandomChain chain) => StationaryLaws.FlowsBalance(chain);
}
