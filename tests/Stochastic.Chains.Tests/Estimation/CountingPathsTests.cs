namespace Stochastic.Chains.Tests.Estimation;

public sealed class CountingPathsTests
{
    private static readonly string[][] CratePaths = [["clean", "filled", "dirty", "clean"], ["clean", "clean", "filled"], []];

    [Fact]
    public void Each_state_followed_by_another_is_one_move()
    {
        var counts = TransitionCounts.FromPaths(CratePaths);

        counts.States.Should().Equal("clean", "filled", "dirty");
        counts["clean", "filled"].Should().Be(2);
        counts["clean", "clean"].Should().Be(1);
        counts["filled", "dirty"].Should().Be(1);
        counts["dirty", "clean"].Should().Be(1);
        counts["dirty", "filled"].Should().Be(0);
        counts.TotalCount.Should().Be(5);
        counts.TotalFrom("clean").Should().Be(3);
        counts.PathCount.Should().Be(3);
        counts.Log.Should().BeNull();
    }

    [Fact]
    public void No_move_leads_from_one_path_to_the_next()
    {
        var counts = TransitionCounts.FromPaths([["a", "b"], ["c", "d"]]);

        counts["b", "c"].Should().Be(0);
        counts.TotalCount.Should().Be(2);
    }

    [Fact]
    public void A_single_path_is_counted_alone()
    {
        var counts = TransitionCounts.FromPath([1, 2, 1, 1]);

        counts[1, 2].Should().Be(1);
        counts[1, 1].Should().Be(1);
        counts.PathCount.Should().Be(1);
    }

    [Fact]
    public void Listed_states_that_are_never_seen_stay_in_their_place()
    {
        var counts = TransitionCounts.FromPath(["lost", "clean", "filled"], ["clean", "filled", "clean"]);

        counts.States.Should().Equal("lost", "clean", "filled");
        counts.TotalFrom("lost").Should().Be(0);
        counts.NeverLeftStates.Should().Equal("lost");
    }

    [Fact]
    public void A_state_seen_without_a_move_stays_a_state() =>
        TransitionCounts.FromPaths([["alone"], ["a", "b", "a"]]).NeverLeftStates.Should().Equal("alone");

    [Fact]
    public void The_comparer_decides_which_labels_are_one_state_and_goes_on_to_the_chain()
    {
        var counts = TransitionCounts.FromPaths([["Clean", "FILLED", "clean"]], StringComparer.OrdinalIgnoreCase);

        counts["clean", "filled"].Should().Be(1);
        counts.States.Should().Equal("Clean", "FILLED");
        counts.ToChain()["CLEAN", "Filled"].Should().Be(1);
    }

    [Fact]
    public void A_state_space_as_list_brings_its_comparer()
    {
        var stages = StateSpace.Of(["Clean", "Filled"], StringComparer.OrdinalIgnoreCase);

        TransitionCounts.FromPaths(stages, [["clean", "filled", "clean"]])["Filled", "Clean"].Should().Be(1);
    }

    [Fact]
    public void Every_fault_is_named_with_path_and_step()
    {
        string[]?[] paths = [["clean", "flied"], null, ["clean", null!, "filled"]];

        var act = () => TransitionCounts.FromPaths(["clean", "filled"], paths!);

        act.Should().Throw<InvalidChainException>().Which.Faults.Select(fault => fault.Message).Should().Equal(
            "Step 2 of path number 1 is 'flied', which is not in the list of states. Correct the label or add it to the list.",
            "Path number 2 is null. Give an empty path for an item without states.",
            "Step 2 of path number 3 is null. Give every state a label.");
    }

    [Fact]
    public void Paths_without_any_state_are_refused()
    {
        var act = () => TransitionCounts.FromPaths<string>([[], []]);

        act.Should().Throw<InvalidChainException>().Which.Faults.Should().ContainSingle()
            .Which.Message.Should().Be("The paths have no states at all. Give at least one path with a state.");
    }

    [Fact]
    public void A_list_of_states_with_a_duplicate_is_refused()
    {
        var act = () => TransitionCounts.FromPaths(["a", "a"], [["a"]]);

        act.Should().Throw<InvalidChainException>().WithMessage("*State 'a' is listed at positions 0 and 1. List each state once.*");
    }

    [Fact]
    public void Null_arguments_are_refused()
    {
        FluentActions.Invoking(() => TransitionCounts.FromPath<string>(null!)).Should().Throw<ArgumentNullException>();
        FluentActions.Invoking(() => TransitionCounts.FromPath(["a"], null!)).Should().Throw<ArgumentNullException>();
        FluentActions.Invoking(() => TransitionCounts.FromPaths<string>(null!)).Should().Throw<ArgumentNullException>();
        FluentActions.Invoking(() => TransitionCounts.FromPaths(CratePaths, null!)).Should().Throw<ArgumentNullException>();
        FluentActions.Invoking(() => TransitionCounts.FromPaths<string>(null!, CratePaths)).Should().Throw<ArgumentNullException>();
    }

    [Fact]
    public void A_label_that_is_no_state_is_refused_in_questions()
    {
        var counts = TransitionCounts.FromPaths(CratePaths);

        FluentActions.Invoking(() => counts["clean", "lost"]).Should().Throw<UnknownStateException>().WithMessage("'lost' is not one of the chain's 3 states:*");
        FluentActions.Invoking(() => counts.TotalFrom("lost")).Should().Throw<UnknownStateException>();
        FluentActions.Invoking(() => counts.CountsFrom("lost")).Should().Throw<UnknownStateException>();
    }

    [Fact]
    public void Many_states_are_counted_as_exactly_as_few()
    {
        // 300 states in a ring, walked around seven times: beyond the table of the first states
        var counts = TransitionCounts.FromPath(Enumerable.Range(0, 2101).Select(step => step % 300));

        counts.States.Should().HaveCount(300);
        counts.Moves.Should().HaveCount(300).And.OnlyContain(move => move.To == (move.From + 1) % 300 && move.Count == 7);
        counts.Moves.Select(move => move.From).Should().BeInAscendingOrder();
    }

    [Fact]
    public void Moves_are_listed_row_by_row_in_state_order()
    {
        var counts = TransitionCounts.FromPaths(CratePaths);

        counts.Moves.Should().Equal(
            new TransitionCount<string>("clean", "clean", 1),
            new TransitionCount<string>("clean", "filled", 2),
            new TransitionCount<string>("filled", "dirty", 1),
            new TransitionCount<string>("dirty", "clean", 1));
        counts.CountsFrom("clean").Should().Equal(
            new TransitionCount<string>("clean", "clean", 1), new TransitionCount<string>("clean", "filled", 2));
        counts.ToArray().Should().BeEquivalentTo(new long[,] { { 1, 2, 0 }, { 0, 0, 1 }, { 1, 0, 0 } });
    }
}
