using Stochastic.Chains.Tests.Support;

namespace Stochastic.Chains.Tests.Model;

public class DistributionTextTests
{
    [Fact]
    public void A_small_distribution_is_a_table_in_state_order()
    {
        var states = StateSpace.Of(["clean", "in wash", "lost"]);

        Distribution.Over(states, ("in wash", 0.87654321), ("clean", 0.12345679)).ToString().Split(Environment.NewLine).Should().Equal(
            "state    probability",
            "clean       0.123457",
            "in wash     0.876543",
            "lost               0");
    }

    [Fact]
    public void The_text_is_the_same_in_every_culture_state_labels_included()
    {
        using var culture = new CommaCulture();

        Distribution.Over(StateSpace.Of([0.5, 1234.5]), (0.5, 0.25), (1234.5, 0.75)).ToString().Split(Environment.NewLine).Should().Equal(
            "state   probability",
            "0.5            0.25",
            "1234.5         0.75");
    }

    [Fact]
    public void Of_a_thousand_states_the_ten_most_likely_are_shown_and_the_rest_counted()
    {
        var states = StateSpace.Of(Enumerable.Range(0, 1000));
        var text = Distribution.FromWeights(states, states.Select(state => (state, state == 500 ? 1001.0 : 1.0))).ToString();

        var lines = text.Split(Environment.NewLine);
        lines.Should().HaveCount(12);
        lines[1].Should().MatchRegex(@"^500\s+0\.5005$");
        lines[2].Should().MatchRegex(@"^0\s+0\.0005$");
        lines[10].Should().MatchRegex(@"^8\s+0\.0005$");
        lines[11].Should().Be("… and 990 more states");
    }

    [Theory]
    [InlineData(12, 13)]
    [InlineData(13, 12)]
    public void The_table_is_whole_up_to_twelve_states(int states, int lines)
    {
        Distribution.Uniform(StateSpace.Of(Enumerable.Range(0, states))).ToString().Split(Environment.NewLine).Should().HaveCount(lines);
    }

    [Fact]
    public void Small_probabilities_are_shown_with_their_exponent()
    {
        Distribution.FromWeights(StateSpace.Of(["a", "b"]), ("a", 1), ("b", 1e-250)).ToString().Should().Contain("1E-250");
    }
}
