using Stochastic.Chains.Tests.Support;

namespace Stochastic.Chains.Tests.Estimation;

public sealed class GivenCountsTests
{
    private static readonly string[] Weather = ["dry", "wet"];

    [Fact]
    public void A_table_is_taken_row_from_column_to()
    {
        var counts = TransitionCounts.FromCounts(Weather, new long[,] { { 70, 20 }, { 21, 0 } });

        counts["dry", "wet"].Should().Be(20);
        counts["wet", "dry"].Should().Be(21);
        counts["wet", "wet"].Should().Be(0);
        counts.TotalCount.Should().Be(111);
        counts.PathCount.Should().Be(0);
    }

    [Fact]
    public void Counts_of_one_move_given_twice_are_summed()
    {
        var counts = TransitionCounts.FromCounts<string>([new("dry", "wet", 3), new("wet", "dry", 1), new("dry", "wet", 4)]);

        counts["dry", "wet"].Should().Be(7);
        counts.States.Should().Equal(Weather);
    }

    [Fact]
    public void Counts_can_be_given_over_listed_states_and_with_a_comparer()
    {
        TransitionCounts.FromCounts(["snow", "dry"], [new TransitionCount<string>("dry", "dry", 3)]).States.Should().Equal("snow", "dry");
        TransitionCounts.FromCounts([new TransitionCount<string>("dry", "DRY", 3)], StringComparer.OrdinalIgnoreCase).States.Should().Equal("dry");
    }

    [Fact]
    public void A_count_of_zero_makes_its_states_known() =>
        TransitionCounts.FromCounts<string>([new("dry", "wet", 0), new("dry", "dry", 1)]).NeverLeftStates.Should().Equal("wet");

    [Fact]
    public void Negative_counts_are_refused_each_with_its_move()
    {
        var table = () => TransitionCounts.FromCounts(Weather, new long[,] { { 70, -2 }, { -3, 15 } });
        var moves = () => TransitionCounts.FromCounts<string>([new("dry", "wet", -2)]);

        table.Should().Throw<InvalidChainException>().Which.Faults.Select(fault => fault.Message).Should().Equal(
            "The count of 'dry' to 'wet' is -2, below zero. Give a whole number, 0 or more.",
            "The count of 'wet' to 'dry' is -3, below zero. Give a whole number, 0 or more.");
        moves.Should().Throw<InvalidChainException>().Which.Faults.Should().ContainSingle().Which.Kind.Should().Be(ChainFaultKind.Negative);
    }

    [Fact]
    public void A_table_of_the_wrong_shape_is_refused()
    {
        var notSquare = () => TransitionCounts.FromCounts(Weather, new long[2, 3]);
        var tooLarge = () => TransitionCounts.FromCounts(Weather, new long[3, 3]);

        notSquare.Should().Throw<InvalidChainException>().WithMessage("*The table of counts has 2 rows and 3 columns. It needs one row and one column for each state.*");
        tooLarge.Should().Throw<InvalidChainException>().WithMessage("*There are 2 states for a matrix of 3 rows. Give one state for each row.*");
    }

    [Fact]
    public void A_move_with_an_unlisted_or_null_state_is_refused()
    {
        var unlisted = () => TransitionCounts.FromCounts(Weather, [new TransitionCount<string>("dry", "wett", 3)]);
        var nothing = () => TransitionCounts.FromCounts<string>([new("dry", null!, 3)]);
        var none = () => TransitionCounts.FromCounts<string>([]);

        unlisted.Should().Throw<InvalidChainException>().WithMessage("*The move 'dry' to 'wett' names 'wett', which is not in the list of states.*");
        nothing.Should().Throw<InvalidChainException>().WithMessage("*Move number 1 names a null state. Give every state a label.*");
        none.Should().Throw<InvalidChainException>().WithMessage("*The chain has no states. Give at least one.*");
    }

    [Fact]
    public void Counts_too_large_to_sum_overflow_instead_of_wrapping()
    {
        var act = () => TransitionCounts.FromCounts(Weather, new long[,] { { long.MaxValue, 1 }, { 0, 0 } });

        act.Should().Throw<OverflowException>();
    }

    [Fact]
    public void Sums_of_counts_add_moves_and_paths_and_have_no_log()
    {
        var first = TransitionCounts.FromPaths(Weather, [["dry", "wet"]]);
        var second = TransitionCounts.FromPaths(Weather, [["dry", "wet", "wet"], ["wet"]]);

        var sum = first + second;

        sum["dry", "wet"].Should().Be(2);
        sum["wet", "wet"].Should().Be(1);
        sum.PathCount.Should().Be(3);
        sum.Log.Should().BeNull();
        first.Add(second).ToArray().Should().BeEquivalentTo(sum.ToArray());
        first["dry", "wet"].Should().Be(1, "counts are immutable");
    }

    [Fact]
    public void Counts_over_different_states_are_not_added()
    {
        var act = () => TransitionCounts.FromPath(["dry", "wet"]) + TransitionCounts.FromPath(["wet", "dry"]);

        act.Should().Throw<ArgumentException>().WithMessage(
            "The counts are over different states or the same in another order: 'dry', 'wet'; 'wet', 'dry'. Count both with one list of states.*");
    }

    [Fact]
    public void The_text_is_a_table_with_totals_the_same_in_every_culture()
    {
        using var german = new CommaCulture();

        TransitionCounts.FromCounts(Weather, new long[,] { { 1049, 350 }, { 0, 687 } }).ToString().ReplaceLineEndings("\n").Should().Be(
            """
            2,086 moves between 2 states
            from \ to    dry  wet  total
            dry        1,049  350  1,399
            wet            ·  687    687
            """);
    }

    [Fact]
    public void Many_states_are_told_in_one_line() =>
        TransitionCounts.FromPath(Enumerable.Range(0, 40)).ToString().Should()
            .Be("39 moves along 1 path between 40 states: '0', '1', '2', '3', '4', '5', '6', '7' and 32 more");
}
