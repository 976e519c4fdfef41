using System.Collections;
using Stochastic.Chains.Tests.Support;

namespace Stochastic.Chains.Tests.Model;

public class StateSpaceTests
{
    private static readonly string[] Labels = ["clean", "filled", "dirty"];

    [Fact]
    public void States_keep_the_order_in_which_they_are_given()
    {
        var states = StateSpace.Of(Labels);

        states.Should().Equal("clean", "filled", "dirty");
        states.Count.Should().Be(3);
        states[0].Should().Be("clean");
        states[2].Should().Be("dirty");
        ((IEnumerable)states).Cast<string>().Should().Equal(Labels);
    }

    [Fact]
    public void The_position_of_each_state_is_found_and_that_of_others_is_minus_one()
    {
        var states = StateSpace.Of(Labels);

        states.Select(states.IndexOf).Should().Equal(0, 1, 2);
        states.IndexOf("Clean").Should().Be(-1);
        states.IndexOf(null!).Should().Be(-1);
        states.Contains("dirty").Should().BeTrue();
        states.Contains("lost").Should().BeFalse();
        states.Contains(null!).Should().BeFalse();
    }

    [Theory]
    [InlineData(-1)]
    [InlineData(3)]
    [InlineData(int.MaxValue)]
    public void A_position_outside_the_list_is_refused(int position)
    {
        var states = StateSpace.Of(Labels);

        FluentActions.Invoking(() => states[position]).Should().Throw<ArgumentOutOfRangeException>().Which.ActualValue.Should().Be(position);
    }

    [Fact]
    public void The_states_are_copied_so_that_a_later_change_of_the_list_does_not_reach_them()
    {
        var list = new List<string>(Labels);
        var states = StateSpace.Of(list);

        list[0] = "changed";
        list.Add("added");

        states.Should().Equal(Labels);
        states.IndexOf("added").Should().Be(-1);
    }

    [Fact]
    public void A_comparer_decides_what_is_the_same_state()
    {
        var states = StateSpace.Of(Labels, StringComparer.OrdinalIgnoreCase);

        states.IndexOf("FILLED").Should().Be(1);
        states.Comparer.Should().BeSameAs(StringComparer.OrdinalIgnoreCase);
        StateSpace.Of(Labels).Comparer.Should().Be(EqualityComparer<string>.Default);
    }

    [Fact]
    public void A_number_as_a_state_is_found_by_value_and_not_by_position()
    {
        var states = StateSpace.Of([30, 10, 20]);

        states.IndexOf(10).Should().Be(1);
        states[1].Should().Be(10);
        states.IndexOf(1).Should().Be(-1);
    }

    [Fact]
    public void No_states_are_refused()
    {
        var refusal = FluentActions.Invoking(() => StateSpace.Of(Array.Empty<string>())).Should().Throw<InvalidChainException>().Which;

        refusal.Faults.Should().ContainSingle().Which.Kind.Should().Be(ChainFaultKind.NoStates);
    }

    [Fact]
    public void Nulls_and_repetitions_are_all_reported_with_their_positions()
    {
        var refusal = FluentActions.Invoking(() => StateSpace.Of(["a", null!, "b", "a", null!, "A"], StringComparer.OrdinalIgnoreCase))
            .Should().Throw<InvalidChainException>().Which;

        refusal.Faults.Select(fault => (fault.Kind, fault.Value)).Should().Equal(
            (ChainFaultKind.NullState, 1),
            (ChainFaultKind.DuplicateState, 3),
            (ChainFaultKind.NullState, 4),
            (ChainFaultKind.DuplicateState, 5));
        refusal.Faults[1].States.Should().Equal("a");
        refusal.Faults[1].Message.Should().Be("State 'a' is listed at positions 0 and 3. List each state once.");
    }

    [Fact]
    public void A_missing_list_or_comparer_is_refused()
    {
        FluentActions.Invoking(() => StateSpace.Of<string>(null!)).Should().Throw<ArgumentNullException>().WithParameterName("states");
        FluentActions.Invoking(() => StateSpace.Of(Labels, null!)).Should().Throw<ArgumentNullException>().WithParameterName("comparer");
    }

    [Fact]
    public void The_text_lists_the_first_eight_states_and_counts_the_rest()
    {
        StateSpace.Of(Labels).ToString().Should().Be("3 states: 'clean', 'filled', 'dirty'");
        StateSpace.Of(["only"]).ToString().Should().Be("1 state: 'only'");
        StateSpace.Of(Enumerable.Range(0, 8)).ToString().Should().EndWith("'7'");
        StateSpace.Of(Enumerable.Range(0, 1500)).ToString().Should().Be("1,500 states: '0', '1', '2', '3', '4', '5', '6', '7' and 1,492 more");
    }

    [Fact]
    public void The_text_is_the_same_in_every_culture()
    {
        using var culture = new CommaCulture();

        StateSpace.Of([0.5, 1234.25]).ToString().Should().Be("2 states: '0.5', '1234.25'");
    }

    [Fact]
    public void Two_spaces_match_when_they_list_the_same_states_in_the_same_order()
    {
        var states = StateSpace.Of(Labels);

        states.Matches(states).Should().BeTrue();
        states.Matches(StateSpace.Of(Labels)).Should().BeTrue();
        states.Matches(StateSpace.Of(Labels.Reverse())).Should().BeFalse();
        states.Matches(StateSpace.Of(Labels.Take(2))).Should().BeFalse();
        states.Matches(null).Should().BeFalse();
    }
}
