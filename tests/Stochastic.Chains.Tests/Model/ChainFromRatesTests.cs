using Stochastic.Chains.Tests.Support;

namespace Stochastic.Chains.Tests.Model;

public class ChainFromRatesTests
{
    [Fact]
    public void Rates_become_probabilities_per_step_and_the_rate_of_steps_is_kept()
    {
        var plant = Chain.FromRates([new("running", "failed", 1e-4), new TransitionRate<string>("failed", "running", 0.05)]);

        plant.States.Should().Equal("running", "failed");
        plant.UniformizationRate.Should().Be(0.0625, "it is the smallest power of two above every state's total rate");
        plant["running", "failed"].Should().Be(1e-4 / 0.0625);
        plant["failed", "running"].Should().Be(0.8);
        plant["failed", "failed"].Should().Be(1 - 0.8);
    }

    public static TheoryData<double> Scales => [1, 1e-9, 1e-300, 4e-308, 1e300, 1e307, 3];

    [Theory]
    [MemberData(nameof(Scales))]
    public void A_probability_times_the_uniformization_rate_is_the_rate_bit_for_bit(double scale)
    {
        var random = new Random(20_260_101);
        var rates = Enumerable.Range(0, 40)
            .SelectMany(from => Enumerable.Range(0, 40).Where(to => to != from).Select(to => new TransitionRate<int>(from, to, scale * random.NextDouble() / 40)))
            .ToList();

        var chain = Chain.FromRates(rates);

        var steps = chain.UniformizationRate!.Value;
        foreach (var (from, to, rate) in rates)
        {
            (chain[from, to] * steps).Should().Be(rate);
        }
    }

    [Fact]
    public void Rates_that_differ_by_three_hundred_orders_of_magnitude_are_kept_bit_for_bit()
    {
        var chain = Chain.FromRates([new("a", "b", 1.1e-300), new TransitionRate<string>("b", "a", 7.3)]);

        (chain["a", "b"] * chain.UniformizationRate!.Value).Should().Be(1.1e-300);
        chain["a", "a"].Should().Be(1);
    }

    [Fact]
    public void The_smallest_rate_there_is_makes_a_chain()
    {
        var chain = Chain.FromRates([new("a", "b", double.Epsilon), new TransitionRate<string>("b", "a", double.Epsilon)]);

        (chain["a", "b"] * chain.UniformizationRate!.Value).Should().Be(double.Epsilon);
        chain["a", "b"].Should().Be(0.5);
    }

    [Theory]
    [InlineData(1.0)]
    [InlineData(0.5)]
    [InlineData(0.9999999999999999)]
    [InlineData(3e200)]
    public void Every_state_keeps_a_chance_to_stay_even_the_busiest(double rate)
    {
        var chain = Chain.FromRates([new("a", "b", rate), new TransitionRate<string>("b", "a", rate)]);

        chain["a", "a"].Should().BePositive();
        (chain["a", "a"] + chain["a", "b"]).Should().Be(1);
        chain["a", "b"].Should().BeInRange(0.5, 1);
    }

    [Fact]
    public void A_state_without_rates_out_of_it_is_never_left()
    {
        var chain = Chain.FromRates([new TransitionRate<string>("ill", "dead", 0.3)]);

        chain["dead", "dead"].Should().Be(1);
        chain.TransitionsFrom("dead").Should().ContainSingle();
    }

    [Fact]
    public void A_rate_of_zero_is_no_move_but_makes_its_states_known()
    {
        var chain = Chain.FromRates([new("a", "b", 0.0), new TransitionRate<string>("b", "a", -0.0)]);

        chain.States.Should().Equal("a", "b");
        chain.UniformizationRate.Should().Be(1);
        chain.TransitionCount.Should().Be(2);
        chain["a", "b"].Should().Be(0);
        chain["a", "a"].Should().Be(1);
    }

    [Theory]
    [InlineData(double.NaN, "NaN")]
    [InlineData(double.PositiveInfinity, "Infinity")]
    [InlineData(double.NegativeInfinity, "-Infinity")]
    public void A_rate_that_is_not_finite_is_refused(double rate, string text)
    {
        var fault = Refusal.OnlyFaultOf(() => Chain.FromRates([new("a", "b", rate), new TransitionRate<string>("b", "a", 1)]));

        fault.Kind.Should().Be(ChainFaultKind.NotFinite);
        fault.States.Should().Equal("a", "b");
        fault.Value.Should().Be(rate);
        fault.Message.Should().Be($"The rate of 'a' to 'b' is {text}. Give a number of moves per unit of time, 0 or more.");
    }

    [Fact]
    public void A_negative_rate_is_refused()
    {
        var fault = Refusal.OnlyFaultOf(() => Chain.FromRates([new TransitionRate<string>("a", "b", -0.25)]));

        fault.Kind.Should().Be(ChainFaultKind.Negative);
        fault.Value.Should().Be(-0.25);
        fault.Message.Should().Contain("'a' to 'b' is -0.25, below zero");
    }

    [Fact]
    public void A_rate_from_a_state_to_itself_is_refused()
    {
        var fault = Refusal.OnlyFaultOf(() => Chain.FromRates([new("a", "a", 2), new TransitionRate<string>("a", "b", 1)]));

        fault.Kind.Should().Be(ChainFaultKind.SelfRate);
        fault.States.Should().Equal("a");
        fault.Value.Should().Be(2);
        fault.Message.Should().Contain("Leave it out");
    }

    [Fact]
    public void A_rate_given_twice_is_refused()
    {
        var fault = Refusal.OnlyFaultOf(() => Chain.FromRates([new("a", "b", 1), new TransitionRate<string>("a", "b", 2)]));

        fault.Kind.Should().Be(ChainFaultKind.DuplicateTransition);
        fault.States.Should().Equal("a", "b");
    }

    [Fact]
    public void A_rate_too_small_beside_the_largest_is_refused_by_name()
    {
        var fault = Refusal.OnlyFaultOf(() => Chain.FromRates([new("slow", "fast", 1e-300), new TransitionRate<string>("fast", "slow", 1e300)]));

        fault.Kind.Should().Be(ChainFaultKind.RateOutOfRange);
        fault.States.Should().Equal("slow", "fast");
        fault.Value.Should().Be(1e-300);
        fault.Message.Should().Contain("1E-300 of 'slow' to 'fast' is too small").And.Contain("rate 0");
    }

    [Theory]
    [InlineData(1e308)]
    [InlineData(double.MaxValue)]
    public void Rates_that_sum_to_more_than_a_double_can_hold_are_refused_by_the_state_s_name(double rate)
    {
        var fault = Refusal.OnlyFaultOf(() => Chain.FromRates(
            [new("wild", "b", rate), new("wild", "c", rate), new("b", "c", 1e-9), new TransitionRate<string>("c", "b", 1)]));

        fault.Kind.Should().Be(ChainFaultKind.RateOutOfRange);
        fault.States.Should().Equal("wild");
        fault.Message.Should().Contain("'wild'").And.Contain("Use a shorter unit of time");
    }

    [Fact]
    public void All_faults_of_the_rates_come_together()
    {
        var refusal = Refusal.Of(() => Chain.FromRates(
            [new("a", "b", -1), new("b", "b", 1), new("c", "a", double.NaN), new TransitionRate<string>("c", null!, 1)]));

        refusal.Faults.Select(fault => fault.Kind).Should().Equal(
            ChainFaultKind.NullState, ChainFaultKind.Negative, ChainFaultKind.SelfRate, ChainFaultKind.NotFinite);
    }

    [Fact]
    public void No_rates_are_refused()
    {
        Refusal.OnlyFaultOf(() => Chain.FromRates(Array.Empty<TransitionRate<string>>())).Kind.Should().Be(ChainFaultKind.NoStates);
    }

    [Fact]
    public void The_comparer_of_the_options_decides_what_is_the_same_state()
    {
        var options = new ChainOptions<string> { Comparer = StringComparer.OrdinalIgnoreCase };

        Chain.FromRates([new("UP", "down", 1), new TransitionRate<string>("Down", "up", 1)], options).States.Should().Equal("UP", "down");
    }

    [Fact]
    public void Missing_arguments_are_refused()
    {
        FluentActions.Invoking(() => Chain.FromRates<string>(null!)).Should().Throw<ArgumentNullException>().WithParameterName("rates");
        FluentActions.Invoking(() => Chain.FromRates(Array.Empty<TransitionRate<string>>(), null!)).Should().Throw<ArgumentNullException>().WithParameterName("options");
    }
}
