using System.Collections;

namespace Stochastic.Chains.Tests.Model;

public class DistributionTests
{
    private static readonly StateSpace<string> Crates = StateSpace.Of(["clean", "filled", "dirty", "lost"]);
    private static readonly Distribution<string> Pool = Distribution.Over(Crates, ("dirty", 0.25), ("clean", 0.5), ("filled", 0.25));

    [Fact]
    public void Each_state_has_its_probability_and_states_not_named_have_none()
    {
        Pool["clean"].Should().Be(0.5);
        Pool["lost"].Should().Be(0);
        Pool.Count.Should().Be(4);
        Pool.Values.ToArray().Should().Equal(0.5, 0.25, 0.25, 0);
        Pool.ToArray().Should().Equal(0.5, 0.25, 0.25, 0);
        Pool.States.Should().BeSameAs(Crates);
    }

    [Fact]
    public void An_unknown_state_is_refused_by_the_indexer_and_not_found_by_the_others()
    {
        FluentActions.Invoking(() => Pool["stolen"]).Should().Throw<UnknownStateException>().Which.State.Should().Be("stolen");
        Pool.ContainsKey("stolen").Should().BeFalse();
        Pool.ContainsKey("lost").Should().BeTrue();
        Pool.TryGetValue("stolen", out var none).Should().BeFalse();
        none.Should().Be(0);
        Pool.TryGetValue("dirty", out var share).Should().BeTrue();
        share.Should().Be(0.25);
        Pool.TryGetValue(null!, out _).Should().BeFalse();
    }

    [Fact]
    public void It_enumerates_as_a_dictionary_in_state_order_zeros_included()
    {
        IReadOnlyDictionary<string, double> dictionary = Pool;

        Pool.Select(pair => pair.Key).Should().Equal(Crates);
        Pool.Select(pair => pair.Value).Should().Equal(0.5, 0.25, 0.25, 0);
        dictionary.Keys.Should().Equal(Crates);
        dictionary.Values.Should().Equal(0.5, 0.25, 0.25, 0);
        ((IEnumerable)Pool).Cast<KeyValuePair<string, double>>().Should().HaveCount(4);
        new Dictionary<string, double>(dictionary)["clean"].Should().Be(0.5);
    }

    [Fact]
    public void The_array_is_a_copy_and_the_values_offered_as_a_sequence_cannot_be_written_through()
    {
        Pool.ToArray()[0] = 7;
        Pool["clean"].Should().Be(0.5);

        var values = ((IReadOnlyDictionary<string, double>)Pool).Values;
        (values is IList<double> { IsReadOnly: false } or double[]).Should().BeFalse("a caller could change the distribution through it");
    }

    [Fact]
    public void An_expectation_weighs_the_figure_of_each_state_that_can_occur()
    {
        var asked = new List<string>();

        var cost = Pool.Expectation(state =>
        {
            asked.Add(state);
            return state == "dirty" ? 4.0 : 1.0;
        });

        cost.Should().Be((0.5 * 1) + (0.25 * 1) + (0.25 * 4));
        asked.Should().Equal("clean", "filled", "dirty");
    }

    [Fact]
    public void An_expectation_of_a_figure_that_can_be_infinite_is_infinite()
    {
        Pool.Expectation(state => state == "filled" ? double.PositiveInfinity : 1).Should().Be(double.PositiveInfinity);
        Pool.Expectation(state => state == "lost" ? double.PositiveInfinity : 1).Should().Be(1, "the state cannot occur");
    }

    [Fact]
    public void An_expectation_keeps_what_large_opposite_figures_would_cancel()
    {
        var states = StateSpace.Of(["in", "tip", "out", "rest"]);
        var flow = Distribution.Over(states, ("in", 0.25), ("tip", 0.25), ("out", 0.25), ("rest", 0.25));

        flow.Expectation(state => state switch { "in" => 1e17, "tip" => 1.0, "out" => -1e17, _ => 0 }).Should().Be(0.25);
    }

    [Fact]
    public void Total_variation_is_half_the_sum_of_absolute_differences()
    {
        var other = Distribution.Over(Crates, ("clean", 0.25), ("lost", 0.75));

        Pool.TotalVariation(other).Should().Be((0.25 + 0.25 + 0.25 + 0.75) / 2);
        other.TotalVariation(Pool).Should().Be(Pool.TotalVariation(other));
        Pool.TotalVariation(Pool).Should().Be(0);
        Distribution.Certain(Crates, "clean").TotalVariation(Distribution.Certain(Crates, "lost")).Should().Be(1);
        Pool.TotalVariation(Distribution.Over(StateSpace.Of(Crates), ("clean", 1))).Should().Be(0.5, "an equal list of states will do");
    }

    [Fact]
    public void Total_variation_refuses_distributions_over_other_states()
    {
        var reordered = Distribution.Uniform(StateSpace.Of(Crates.Reverse()));
        var fewer = Distribution.Uniform(StateSpace.Of(Crates.Take(3)));

        FluentActions.Invoking(() => Pool.TotalVariation(reordered)).Should().Throw<ArgumentException>().WithParameterName("other");
        FluentActions.Invoking(() => Pool.TotalVariation(fewer)).Should().Throw<ArgumentException>().WithMessage("*(4 states and 3)*Use distributions over the states of one chain.*");
        FluentActions.Invoking(() => Pool.TotalVariation(null!)).Should().Throw<ArgumentNullException>();
    }

    [Fact]
    public void The_most_likely_states_come_first_and_equals_in_state_order()
    {
        Pool.MostLikely(3).Should().Equal(KeyValuePair.Create("clean", 0.5), KeyValuePair.Create("filled", 0.25), KeyValuePair.Create("dirty", 0.25));
        Pool.MostLikely(0).Should().BeEmpty();
        Pool.MostLikely(99).Should().HaveCount(4);
        Distribution.Uniform(Crates).MostLikely(4).Select(pair => pair.Key).Should().Equal(Crates);
    }

    [Fact]
    public void A_negative_count_of_most_likely_states_is_refused()
    {
        FluentActions.Invoking(() => Pool.MostLikely(-1)).Should().Throw<ArgumentOutOfRangeException>();
        FluentActions.Invoking(() => Pool.Expectation(null!)).Should().Throw<ArgumentNullException>();
    }

    [Fact]
    public void States_are_found_through_the_comparer_of_the_chain()
    {
        var states = StateSpace.Of(["Clean", "Dirty"], StringComparer.OrdinalIgnoreCase);

        Distribution.Over(states, ("CLEAN", 0.5), ("dirty", 0.5))["clean"].Should().Be(0.5);
    }
}
