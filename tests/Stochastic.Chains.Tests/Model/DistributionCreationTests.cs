namespace Stochastic.Chains.Tests.Model;

public class DistributionCreationTests
{
    private const double UnitRoundoff = 1.1102230246251565e-16;

    private static readonly StateSpace<string> States = StateSpace.Of(["a", "b", "c"]);

    [Fact]
    public void Probabilities_are_kept_as_given()
    {
        var third = Distribution.Over(States, ("a", 1.0 / 3), ("b", 1.0 / 3), ("c", 1.0 / 3));

        third.ToArray().Should().Equal(1.0 / 3, 1.0 / 3, 1.0 / 3);
    }

    [Fact]
    public void Probabilities_come_from_any_sequence()
    {
        Distribution.Over(States, States.Select(state => (state, state == "b" ? 1.0 : 0.0)))["b"].Should().Be(1);
    }

    [Theory]
    [InlineData(0.9e-9, true)]
    [InlineData(-0.9e-9, true)]
    [InlineData(1.1e-9, false)]
    [InlineData(-1.1e-9, false)]
    public void Probabilities_must_sum_to_one_within_ten_to_the_minus_nine(double deviation, bool passes)
    {
        var making = FluentActions.Invoking(() => Distribution.Over(States, ("a", 0.5), ("b", 0.5 + deviation)));

        if (passes)
        {
            making.Should().NotThrow();
        }
        else
        {
            making.Should().Throw<ArgumentException>().WithParameterName("probabilities").WithMessage("The probabilities sum to *use Distribution.FromWeights*");
        }
    }

    [Fact]
    public void No_probabilities_at_all_are_refused()
    {
        FluentActions.Invoking(() => Distribution.Over(States)).Should().Throw<ArgumentException>().WithMessage("The probabilities sum to 0. *");
    }

    [Theory]
    [InlineData(-0.1, "-0.1")]
    [InlineData(1.5, "1.5")]
    [InlineData(double.NaN, "NaN")]
    [InlineData(double.PositiveInfinity, "Infinity")]
    public void A_probability_outside_zero_to_one_is_refused(double value, string text)
    {
        FluentActions.Invoking(() => Distribution.Over(States, ("b", value))).Should().Throw<ArgumentException>()
            .WithParameterName("probabilities").WithMessage($"The probability of 'b' is {text}. Give a number from 0 to 1.*");
    }

    [Theory]
    [InlineData(-3, "-3")]
    [InlineData(double.NaN, "NaN")]
    [InlineData(double.PositiveInfinity, "Infinity")]
    public void A_weight_that_is_negative_or_not_finite_is_refused(double value, string text)
    {
        FluentActions.Invoking(() => Distribution.FromWeights(States, ("b", value))).Should().Throw<ArgumentException>()
            .WithParameterName("weights").WithMessage($"The weight of 'b' is {text}. Give a finite number, 0 or more.*");
    }

    [Fact]
    public void Weights_are_divided_by_their_sum()
    {
        Distribution.FromWeights(States, ("a", 1200), ("c", 400)).ToArray().Should().Equal(0.75, 0, 0.25);
    }

    [Theory]
    [InlineData(1e308)]
    [InlineData(double.MaxValue)]
    [InlineData(1e-308)]
    [InlineData(double.Epsilon)]
    public void Weights_of_any_size_are_shared_out_without_overflow_or_loss(double weight)
    {
        Distribution.FromWeights(States, ("a", weight), ("b", weight), ("c", weight)).ToArray()
            .Should().OnlyContain(share => Math.Abs(share - (1.0 / 3)) <= 2 * UnitRoundoff / 3, "the sum and the quotient are each rounded once");
    }

    [Fact]
    public void A_weight_far_below_the_others_keeps_its_share()
    {
        Distribution.FromWeights(States, ("a", 1.0), ("b", 1e-250))["b"].Should().Be(1e-250);
    }

    [Fact]
    public void Weights_that_are_all_zero_or_missing_are_refused()
    {
        FluentActions.Invoking(() => Distribution.FromWeights(States, ("a", 0.0), ("b", -0.0))).Should().Throw<ArgumentException>()
            .WithParameterName("weights").WithMessage("All weights are zero*");
        FluentActions.Invoking(() => Distribution.FromWeights(States)).Should().Throw<ArgumentException>().WithMessage("All weights are zero*");
    }

    [Fact]
    public void A_share_of_minus_zero_is_zero()
    {
        double.IsNegative(Distribution.Over(States, ("a", 1.0), ("b", -0.0))["b"]).Should().BeFalse();
        double.IsNegative(Distribution.FromWeights(States, ("a", 1.0), ("b", -0.0))["b"]).Should().BeFalse();
    }

    [Fact]
    public void A_state_given_twice_is_refused_even_with_a_zero()
    {
        FluentActions.Invoking(() => Distribution.Over(States, ("a", 0.0), ("a", 1.0))).Should().Throw<ArgumentException>()
            .WithParameterName("probabilities").WithMessage("State 'a' is given twice. Give it once, with its whole share.*");
        FluentActions.Invoking(() => Distribution.FromWeights(States, ("a", 1), ("a", 1))).Should().Throw<ArgumentException>()
            .WithParameterName("weights").WithMessage("State 'a' is given twice.*");
    }

    [Fact]
    public void An_unknown_state_is_refused_by_every_way_of_making_one()
    {
        FluentActions.Invoking(() => Distribution.Over(States, ("x", 1.0))).Should().Throw<UnknownStateException>();
        FluentActions.Invoking(() => Distribution.FromWeights(States, ("x", 1))).Should().Throw<UnknownStateException>();
        FluentActions.Invoking(() => Distribution.Certain(States, "x")).Should().Throw<UnknownStateException>().Which.State.Should().Be("x");
    }

    [Fact]
    public void Certainty_is_one_state_with_probability_one()
    {
        Distribution.Certain(States, "b").ToArray().Should().Equal(0, 1, 0);
    }

    [Theory]
    [InlineData(1)]
    [InlineData(3)]
    [InlineData(1000)]
    public void Uniform_gives_every_state_the_same(int count)
    {
        var uniform = Distribution.Uniform(StateSpace.Of(Enumerable.Range(0, count)));

        uniform.ToArray().Should().HaveCount(count).And.OnlyContain(value => value == 1.0 / count);
    }

    [Fact]
    public void Missing_arguments_are_refused_by_name()
    {
        StateSpace<string> none = null!;
        FluentActions.Invoking(() => Distribution.Over(none, ("a", 1.0))).Should().Throw<ArgumentNullException>().WithParameterName("states");
        FluentActions.Invoking(() => Distribution.FromWeights(none, ("a", 1.0))).Should().Throw<ArgumentNullException>().WithParameterName("states");
        FluentActions.Invoking(() => Distribution.Uniform(none)).Should().Throw<ArgumentNullException>().WithParameterName("states");
        FluentActions.Invoking(() => Distribution.Certain(none, "a")).Should().Throw<ArgumentNullException>().WithParameterName("states");
        FluentActions.Invoking(() => Distribution.Over(States, null!)).Should().Throw<ArgumentNullException>().WithParameterName("probabilities");
        FluentActions.Invoking(() => Distribution.FromWeights(States, null!)).Should().Throw<ArgumentNullException>().WithParameterName("weights");
    }
}
