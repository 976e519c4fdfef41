using Stochastic.Chains.Tests.Support;

namespace Stochastic.Chains.Tests.Model;

public class ChainChangesTests
{
    private static readonly Chain<string> Pump = Chain.Build<string>(rows => rows
        .Row("new", ("new", 0.90), ("worn", 0.10))
        .Row("worn", ("worn", 0.75), ("failed", 0.25))
        .Row("failed", ("new", 1.0)));

    [Fact]
    public void States_made_absorbing_are_never_left_and_nothing_else_changes()
    {
        var ending = Pump.MakeAbsorbing("failed");

        ending.Structure().AbsorbingStates.Should().Equal("failed");
        ending.States.Should().Equal(Pump.States);
        ending["new", "worn"].Should().Be(0.10);
        ending["failed", "failed"].Should().Be(1);
        ending["failed", "new"].Should().Be(0);
        Pump["failed", "new"].Should().Be(1, "the old chain stays as it is");
        ending.StartingIn("new").After(52)["failed"]
            .Should().BeApproximately(Pump.TimeTo("failed").Distribution("new", 52).CumulativeProbability(52), Tolerances.Steps(52, 3));
    }

    [Fact]
    public void The_unit_of_time_and_the_account_of_rescaled_rows_are_kept()
    {
        var plant = Chain.FromRates([new TransitionRate<string>("running", "failed", 1e-4), new TransitionRate<string>("failed", "running", 0.05)]);
        var rescaled = Chain.Build(
            rows => rows.Row("a", ("a", 0.6), ("b", 0.41)).Row("b", ("a", 1.01)), new ChainOptions<string> { RowSums = RowSums.Rescale(0.05) });

        plant.MakeAbsorbing("failed").UniformizationRate.Should().Be(plant.UniformizationRate);
        plant.MakeAbsorbing("failed").TimeTo("failed").Mean("running").Should().Be(plant.TimeTo("failed").Mean("running"));
        rescaled.MakeAbsorbing("b").RescaledRows.Should().ContainSingle().Which.State.Should().Be("a");
    }

    [Fact]
    public void Unknown_states_are_refused()
    {
        Pump.Invoking(pump => pump.MakeAbsorbing("broken")).Should().Throw<UnknownStateException>();
        Pump.Invoking(pump => pump.MakeAbsorbing((IEnumerable<string>)null!)).Should().Throw<ArgumentNullException>();
    }
}
