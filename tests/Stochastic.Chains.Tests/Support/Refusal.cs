namespace Stochastic.Chains.Tests.Support;

/// <summary>Catches the refusal that an action must end in.</summary>
internal static class Refusal
{
    /// <summary>The refusal of an invalid chain, with all its faults.</summary>
    internal static InvalidChainException Of<TState>(Func<Chain<TState>> construction)
        where TState : notnull => FluentActions.Invoking(construction).Should().Throw<InvalidChainException>().Which;

    /// <summary>The one fault of an invalid chain that has no other.</summary>
    internal static ChainFault OnlyFaultOf<TState>(Func<Chain<TState>> construction)
        where TState : notnull
    {
        var refusal = Of(construction);
        refusal.FaultCount.Should().Be(1, refusal.Message);
        refusal.Message.Should().Contain(refusal.Faults[0].Message).And.Contain("1 fault)");
        return refusal.Faults.Should().ContainSingle().Which;
    }
}
