using Stochastic.Chains.Tests.Support;

namespace Stochastic.Chains.Tests.Model;

public class ChainFromTransitionsTests
{
    private static readonly Transition<string>[] Moves =
    [
        new("dirty", "clean", 1.0),
        new("clean", "filled", 0.75),
        new("filled", "dirty", 1.0),
        new("clean", "clean", 0.25),
    ];

    [Fact]
    public void Moves_in_any_order_make_a_chain_on_the_states_first_seen()
    {
        var chain = Chain.FromTransitions(Moves);

        chain.States.Should().Equal("dirty", "clean", "filled");
        chain.TransitionCount.Should().Be(4);
        chain["clean", "filled"].Should().Be(0.75);
        chain["filled", "clean"].Should().Be(0);
    }

    [Fact]
    public void Given_states_keep_their_order()
    {
        var chain = Chain.FromTransitions(["clean", "filled", "dirty"], Moves);

        chain.States.Should().Equal("clean", "filled", "dirty");
        chain["clean", "filled"].Should().Be(0.75);
    }

    [Fact]
    public void The_moves_are_read_exactly_once()
    {
        var reads = 0;
        IEnumerable<Transition<string>> Source()
        {
            reads++;
            foreach (var move in Moves)
            {
                yield return move;
            }
        }

        Chain.FromTransitions(Source());

        reads.Should().Be(1);
    }

    [Fact]
    public void Options_reach_both_forms()
    {
        var options = new ChainOptions<string> { Comparer = StringComparer.OrdinalIgnoreCase, RowSums = RowSums.Rescale(0.5) };
        Transition<string>[] moves = [new("a", "B", 0.75), new("b", "A", 1)];

        var seen = Chain.FromTransitions(moves, options);
        var given = Chain.FromTransitions(["A", "B"], moves, options);

        seen.States.Should().Equal("a", "B");
        given.States.Should().Equal("A", "B");
        seen["A", "b"].Should().Be(1);
        given.RescaledRows.Should().Equal(new RescaledRow<string>("A", 0.75));
    }

    [Fact]
    public void A_move_to_a_label_outside_the_given_states_is_refused_once()
    {
        var fault = Refusal.OnlyFaultOf(() => Chain.FromTransitions(["up", "down"], [new("up", "donw", 1.0), new Transition<string>("down", "up", 1.0)]));

        fault.Kind.Should().Be(ChainFaultKind.UnknownState);
        fault.States.Should().Equal("donw");
        fault.Value.Should().Be(0, "it is the move at position 0");
        fault.Message.Should().Be("The move 'up' to 'donw' names 'donw', which is not in the list of states. Correct the label or add it to the list.");
    }

    [Fact]
    public void What_was_given_to_a_wrong_label_still_counts_in_the_sum_of_its_row()
    {
        var refusal = Refusal.Of(() => Chain.FromTransitions(["a"], [new("a", "a", 0.75), new Transition<string>("a", "x", 0.5)]));

        refusal.Faults.Select(fault => fault.Kind).Should().Equal(ChainFaultKind.UnknownState, ChainFaultKind.RowSum);
        refusal.Faults[1].Value.Should().Be(1.25);
    }

    [Fact]
    public void A_move_with_a_null_state_is_refused_once_with_its_number()
    {
        var fault = Refusal.OnlyFaultOf(() => Chain.FromTransitions([new("a", "a", 0.5), new Transition<string>("a", null!, 0.5)]));

        fault.Kind.Should().Be(ChainFaultKind.NullState);
        fault.States.Should().Equal("a", "null");
        fault.Value.Should().Be(1);
        fault.Message.Should().Be("Move number 2 names a null state. Give every state a label.");
    }

    [Fact]
    public void A_move_from_a_null_state_is_refused()
    {
        var fault = Refusal.OnlyFaultOf(() => Chain.FromTransitions([new("a", "a", 1), new Transition<string>(null!, "a", 1)]));

        fault.Kind.Should().Be(ChainFaultKind.NullState);
        fault.States.Should().Equal("null", "a");
    }

    [Fact]
    public void A_state_that_is_only_entered_is_refused_by_name()
    {
        var fault = Refusal.OnlyFaultOf(() => Chain.FromTransitions([new Transition<string>("in", "gone", 1)]));

        fault.Kind.Should().Be(ChainFaultKind.EmptyRow);
        fault.States.Should().Equal("gone");
        fault.Message.Should().Contain("'gone' has no move out of it").And.Contain("a move to itself with probability 1");
    }

    [Fact]
    public void A_given_state_that_no_move_names_is_refused_by_name()
    {
        Refusal.OnlyFaultOf(() => Chain.FromTransitions(["a", "idle"], [new Transition<string>("a", "a", 1)]))
            .States.Should().Equal("idle");
    }

    [Fact]
    public void No_moves_are_refused()
    {
        Refusal.OnlyFaultOf(() => Chain.FromTransitions(Array.Empty<Transition<string>>())).Kind.Should().Be(ChainFaultKind.NoStates);
    }

    [Fact]
    public void Faults_of_the_list_of_states_and_of_the_moves_come_together()
    {
        var refusal = Refusal.Of(() => Chain.FromTransitions(["a", "a", null!], [new Transition<string>("a", "a", 0.5)]));

        refusal.Faults.Select(fault => fault.Kind).Should().Equal(ChainFaultKind.DuplicateState, ChainFaultKind.NullState, ChainFaultKind.RowSum);
    }

    [Fact]
    public void Trying_gives_the_chain_or_the_faults()
    {
        Chain.TryFromTransitions(Moves, out var chain, out var none).Should().BeTrue();
        chain!.StateCount.Should().Be(3);
        none.Should().BeEmpty();

        Chain.TryFromTransitions(Moves.Take(3), out var missing, out var faults).Should().BeFalse();
        missing.Should().BeNull();
        faults.Should().ContainSingle().Which.Kind.Should().Be(ChainFaultKind.RowSum);
    }

    [Fact]
    public void Trying_honours_the_options()
    {
        var options = new ChainOptions<string> { RowSums = RowSums.Rescale(0.3) };

        Chain.TryFromTransitions(Moves.Take(3), options, out var chain, out _).Should().BeTrue();

        chain!["clean", "filled"].Should().Be(1);
    }

    [Fact]
    public void Missing_arguments_are_refused()
    {
        FluentActions.Invoking(() => Chain.FromTransitions<string>(null!)).Should().Throw<ArgumentNullException>().WithParameterName("transitions");
        FluentActions.Invoking(() => Chain.FromTransitions(Moves, (ChainOptions<string>)null!)).Should().Throw<ArgumentNullException>().WithParameterName("options");
        FluentActions.Invoking(() => Chain.FromTransitions(null!, Moves)).Should().Throw<ArgumentNullException>().WithParameterName("states");
        FluentActions.Invoking(() => Chain.FromTransitions(["a"], null!)).Should().Throw<ArgumentNullException>().WithParameterName("transitions");
        FluentActions.Invoking(() => Chain.FromTransitions(["a"], Moves, null!)).Should().Throw<ArgumentNullException>().WithParameterName("options");
        FluentActions.Invoking(() => Chain.TryFromTransitions<string>(null!, out _, out _)).Should().Throw<ArgumentNullException>().WithParameterName("transitions");
        FluentActions.Invoking(() => Chain.TryFromTransitions(Moves, null!, out _, out _)).Should().Throw<ArgumentNullException>().WithParameterName("options");
    }
}
