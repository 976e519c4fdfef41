using Stochastic.Chains.Tests.Support;

namespace Stochastic.Chains.Tests.Model;

public class ChainChangesTests
{
    private static readonly Chain<string> Pump = Chain.Build<string>(rows => rows
        .Row("new", ("new", 0.90), ("worn", 0.10))
        .Row("worn", ("worn", 0.75), ("failed", 0.25))
        .Row("failed", ("new", 1.0)));

    private static readonly Chain<string> Plant =
        Chain.FromRates([new TransitionRate<string>("running", "failed", 1e-4), new TransitionRate<string>("failed", "running", 0.05)]);

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
        var rescaled = Chain.Build(
            rows => rows.Row("a", ("a", 0.6), ("b", 0.41)).Row("b", ("a", 1.01)), new ChainOptions<string> { RowSums = RowSums.Rescale(0.05) });

        Plant.MakeAbsorbing("failed").UniformizationRate.Should().Be(Plant.UniformizationRate);
        Plant.MakeAbsorbing("failed").TimeTo("failed").Mean("running").Should().Be(Plant.TimeTo("failed").Mean("running"));
        rescaled.MakeAbsorbing("b").RescaledRows.Should().ContainSingle().Which.State.Should().Be("a");
    }

    [Fact]
    public void Unknown_states_are_refused()
    {
        Pump.Invoking(pump => pump.MakeAbsorbing("broken")).Should().Throw<UnknownStateException>();
        Pump.Invoking(pump => pump.MakeAbsorbing((IEnumerable<string>)null!)).Should().Throw<ArgumentNullException>();
    }

    [Fact]
    public void A_row_is_replaced_and_nothing_else()
    {
        var better = Pump.With("worn", ("worn", 0.9), ("failed", 0.1));

        better["worn", "failed"].Should().Be(0.1);
        better["worn", "worn"].Should().Be(0.9);
        better["new", "worn"].Should().Be(0.10);
        better.TransitionCount.Should().Be(Pump.TransitionCount);
        Pump.With("failed", ("failed", 1)).Structure().AbsorbingStates.Should().Equal("failed");
    }

    [Fact]
    public void A_bad_row_is_refused_with_all_its_faults()
    {
        Pump.Invoking(pump => pump.With("worn", ("worn", 0.5), ("failed", 0.4))).Should().Throw<InvalidChainException>().WithMessage("*'worn'*0.9*");
        Pump.Invoking(pump => pump.With("worn", ("worn", -0.5), ("failed", double.NaN))).Should().Throw<InvalidChainException>().Which.Faults.Should().HaveCountGreaterThan(1);
        Pump.Invoking(pump => pump.With("worn", ("worn", 0.5), ("worn", 0.5))).Should().Throw<InvalidChainException>();
        Pump.Invoking(pump => pump.With("worn")).Should().Throw<InvalidChainException>();
        Pump.Invoking(pump => pump.With("worn", ("broken", 1))).Should().Throw<UnknownStateException>();
        Plant.Invoking(plant => plant.With("running", ("failed", 1))).Should().Throw<InvalidOperationException>().WithMessage("*Chain.FromRates*");
    }

    [Fact]
    public void An_amount_is_shifted_from_one_move_to_another()
    {
        var slower = Pump.Shift("worn", "worn", 0.05, "failed");

        slower["worn", "failed"].Should().Be(0.25 - 0.05);
        slower["worn", "worn"].Should().Be(0.75 + 0.05);
        Pump.Shift("worn", "new", 0.25, "failed").TransitionsFrom("worn").Select(move => move.To).Should().Equal("new", "worn");
        Pump.Invoking(pump => pump.Shift("worn", "new", 0.3, "failed")).Should().Throw<ArgumentOutOfRangeException>().WithMessage("0.3 cannot be taken from*0.25*");
        Pump.Invoking(pump => pump.Shift("worn", "new", 0, "failed")).Should().Throw<ArgumentOutOfRangeException>();
        Pump.Invoking(pump => pump.Shift("worn", "failed", 0.1, "failed")).Should().Throw<ArgumentException>().WithMessage("Both moves lead to 'failed'*");
        Plant.Invoking(plant => plant.Shift("running", "failed", 1e-5, "running")).Should().Throw<InvalidOperationException>();
    }

    [Fact]
    public void A_lazy_chain_has_the_same_shares_and_no_cycle()
    {
        var cycle = Chain.Build<int>(rows => rows.Row(0, (1, 1)).Row(1, (2, 1)).Row(2, (0, 0.5), (1, 0.5)));
        var lazy = cycle.Lazy(0.5);

        lazy.Structure().Period.Should().Be(1);
        lazy.Stationary().Values.ToArray().Zip(cycle.Stationary().Values.ToArray())
            .Should().OnlyContain(pair => Math.Abs(pair.First - pair.Second) <= Tolerances.SubtractionFree(3));
        cycle.Invoking(it => it.Lazy(1)).Should().Throw<ArgumentOutOfRangeException>();
        Plant.Invoking(it => it.Lazy(0.5)).Should().Throw<InvalidOperationException>();
    }

    [Fact]
    public void States_left_out_take_their_moves_with_them()
    {
        var pool = Chain.Build<string>(rows => rows.Row("clean", ("clean", 0.2), ("out", 0.8)).Row("out", ("clean", 0.9), ("lost", 0.1)).Row("lost", ("lost", 1)));
        var inUse = pool.Without("lost");

        inUse.States.Should().Equal("clean", "out");
        inUse["out", "clean"].Should().Be(1);
        inUse.RescaledRows.Should().ContainSingle().Which.Sum.Should().Be(0.9);
        pool.Invoking(it => it.Without("clean", "out", "lost")).Should().Throw<ChainStructureException>().WithMessage("All states are left out*");
        pool.Invoking(it => it.Without("clean")).Should().NotThrow();
        pool.Invoking(it => it.Without("clean", "lost")).Should().Throw<ChainStructureException>().WithMessage("'out' can only move into*");
        pool.Invoking(it => it.Without("broken")).Should().Throw<UnknownStateException>();
    }

    [Fact]
    public void Rates_between_the_states_that_stay_are_kept()
    {
        var plant = Chain.FromRates([
            new TransitionRate<string>("a", "b", 3), new TransitionRate<string>("b", "a", 1), new TransitionRate<string>("b", "c", 2), new TransitionRate<string>("c", "a", 1)]);

        plant.Without("c").TimeTo("a").Mean("b").Should().Be(1);
    }
}
