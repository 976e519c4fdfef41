using System.Numerics;
using Stochastic.Chains.Estimation;

namespace Stochastic.Chains.Tests.Estimation;

public sealed class FittingTests
{
    [Fact]
    public void Each_probability_is_the_count_over_its_row_total_correctly_rounded()
    {
        var chain = TransitionCounts.FromCounts(["a", "b", "c"], new long[,] { { 1, 1, 1 }, { 3, 0, 7 }, { 0, 0, 9 } }).ToChain();

        chain["a", "b"].Should().Be(1.0 / 3);
        chain["b", "c"].Should().Be(7.0 / 10);
        chain["b", "b"].Should().Be(0);
        chain["c", "c"].Should().Be(1);
        chain.RescaledRows.Should().BeEmpty();
        chain.TransitionCount.Should().Be(6);
    }

    [Fact]
    public void Fitted_rows_sum_to_one_within_the_tolerance_of_a_chain()
    {
        var seeded = new Random(20240131);
        var table = new long[90, 90];
        for (var row = 0; row < 90; row++)
        {
            for (var column = 0; column < 90; column++)
            {
                table[row, column] = seeded.NextInt64(1, 1L << (1 + (column % 40)));
            }
        }

        var chain = TransitionCounts.FromCounts([.. Enumerable.Range(0, 90)], table).ToChain();

        Chain.TryFromMatrix(chain.States, chain.ToArray(), out _, out var faults).Should().BeTrue();
        faults.Should().BeEmpty();
    }

    [Fact]
    public void An_unobserved_row_is_refused_naming_the_state_and_the_choices()
    {
        var act = () => TransitionCounts.FromPaths(["clean", "filled", "lost"], [["clean", "filled", "clean"]]).ToChain();

        var fault = act.Should().Throw<InvalidChainException>().Which.Faults.Should().ContainSingle().Which;
        fault.Kind.Should().Be(ChainFaultKind.UnobservedRow);
        fault.States.Should().Equal("lost");
        fault.Message.Should().Be(
            "State 'lost' was never seen to be followed by anything, so its probabilities are unknown. Observe longer, " +
            "or choose UnobservedStates.Absorbing or UnobservedStates.Drop.");
    }

    [Fact]
    public void Absorbing_makes_an_unobserved_state_one_that_is_never_left()
    {
        var chain = TransitionCounts.FromPaths([["clean", "filled", "clean", "filled", "lost"]]).ToChain(UnobservedStates.Absorbing);

        chain["lost", "lost"].Should().Be(1);
        chain["filled", "lost"].Should().Be(0.5);
        chain.States.Should().Equal("clean", "filled", "lost");
    }

    [Fact]
    public void Drop_leaves_out_an_unobserved_state_and_the_moves_into_it()
    {
        var counts = TransitionCounts.FromPaths([["clean", "filled", "clean", "filled", "misspelt"]]);

        var chain = counts.ToChain(UnobservedStates.Drop);

        chain.States.Should().Equal("clean", "filled");
        chain["filled", "clean"].Should().Be(1);
        counts.FindDroppedStates().Should().Equal("misspelt");
    }

    [Fact]
    public void Drop_goes_on_until_every_state_left_has_a_move()
    {
        var counts = TransitionCounts.FromPaths([["a", "b", "a", "c", "d", "e"], ["a", "a"]]);

        counts.FindDroppedStates().Should().Equal("c", "d", "e");
        var chain = counts.ToChain(UnobservedStates.Drop);
        chain.States.Should().Equal("a", "b");
        chain["a", "a"].Should().Be(0.5);
        chain["a", "b"].Should().Be(0.5);
    }

    [Fact]
    public void Drop_keeps_the_comparer_of_the_states() =>
        TransitionCounts.FromPaths([["A", "b", "a", "C"]], StringComparer.OrdinalIgnoreCase).ToChain(UnobservedStates.Drop)["a", "B"].Should().Be(1);

    [Fact]
    public void Dropping_everything_is_refused()
    {
        var act = () => TransitionCounts.FromPath(["a", "b", "c"]).ToChain(UnobservedStates.Drop);

        act.Should().Throw<InvalidChainException>().Which.Faults.Should().ContainSingle().Which.Message.Should().Be(
            "No state is left when those never left are dropped, of 'a', 'b', 'c'. Observe longer, or choose UnobservedStates.Absorbing.");
    }

    [Fact]
    public void Nothing_is_dropped_where_every_state_is_left() =>
        TransitionCounts.FromPath(["a", "b", "a"]).FindDroppedStates().Should().BeEmpty();

    [Fact]
    public void An_unknown_choice_is_refused()
    {
        var act = () => TransitionCounts.FromPath(["a", "a"]).ToChain((UnobservedStates)7);

        act.Should().Throw<ArgumentOutOfRangeException>().WithMessage("The choice is none of UnobservedStates. Give one of Refuse, Absorbing and Drop.*");
    }

    [Fact]
    public void Ratios_of_huge_counts_are_correctly_rounded()
    {
        var seeded = new Random(17);
        for (var trial = 0; trial < 20_000; trial++)
        {
            var whole = seeded.NextInt64() | (1L << (54 + (trial % 9)));
            var part = trial % 3 == 0 ? seeded.NextInt64(1L << (1 + (trial % 50))) : seeded.NextInt64(whole);
            part = Math.Min(part, whole);

            ShouldBeNearest(ExactRatio.Of(part, whole), part, whole);
        }
    }

    [Fact]
    public void Ratios_at_the_edges_are_exact()
    {
        ExactRatio.Of(0, long.MaxValue).Should().Be(0);
        ExactRatio.Of(long.MaxValue, long.MaxValue).Should().Be(1);
        ExactRatio.Of(1, 1L << 62).Should().Be(Math.ScaleB(1, -62));
        ShouldBeNearest(ExactRatio.Of(long.MaxValue - 1, long.MaxValue), long.MaxValue - 1, long.MaxValue);
        ShouldBeNearest(ExactRatio.Of(1, long.MaxValue), 1, long.MaxValue);
    }

    /// <summary>Exact integer arithmetic: twice the distance is at most the gap to each neighbour.</summary>
    private static void ShouldBeNearest(double ratio, long part, long whole)
    {
        var (below, at, above) = (Scaled(Math.BitDecrement(ratio)), Scaled(ratio), Scaled(Math.BitIncrement(ratio)));
        var truth = (BigInteger)part << 200;
        (2 * truth >= (below + at) * whole).Should().BeTrue($"{part}/{whole} is not nearer to the double below");
        (2 * truth <= (above + at) * whole).Should().BeTrue($"{part}/{whole} is not nearer to the double above");
    }

    private static BigInteger Scaled(double value)
    {
        if (value <= 0)
        {
            return 0;
        }

        var exponent = Math.ILogB(value) - 52;
        return (BigInteger)(long)Math.ScaleB(value, -exponent) << (200 + exponent);
    }
}
