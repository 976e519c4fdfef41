using Stochastic.Chains.Tests.Support;

namespace Stochastic.Chains.Tests.Model;

public class ChainBuildTests
{
    [Fact]
    public void Rows_written_out_in_code_make_a_chain()
    {
        var pump = Chain.Build<Stage>(rows => rows
            .Row(Stage.New, (Stage.New, 0.90), (Stage.Worn, 0.10))
            .Row(Stage.Worn, (Stage.Worn, 0.75), (Stage.Failed, 0.25))
            .Row(Stage.Failed, (Stage.New, 1.0)));

        pump.StateCount.Should().Be(3);
        pump.TransitionCount.Should().Be(5);
        pump[Stage.New, Stage.Worn].Should().Be(0.10);
        pump[Stage.Worn, Stage.Failed].Should().Be(0.25);
        pump[Stage.Failed, Stage.New].Should().Be(1);
        pump[Stage.Failed, Stage.Failed].Should().Be(0);
        pump.UniformizationRate.Should().BeNull();
        pump.RescaledRows.Should().BeEmpty();
    }

    [Fact]
    public void States_come_in_the_order_in_which_the_rows_first_name_them()
    {
        var chain = Chain.Build<string>(rows => rows
            .Row("c", ("a", 0.5), ("c", 0.5))
            .Row("b", ("c", 1.0))
            .Row("a", ("b", 1.0)));

        chain.States.Should().Equal("c", "a", "b");
    }

    [Fact]
    public void The_comparer_of_the_options_decides_what_is_the_same_state()
    {
        var options = new ChainOptions<string> { Comparer = StringComparer.OrdinalIgnoreCase };

        var chain = Chain.Build(rows => rows.Row("Up", ("DOWN", 1.0)).Row("down", ("UP", 1.0)), options);

        chain.States.Should().Equal("Up", "DOWN");
        chain["up", "down"].Should().Be(1);
    }

    [Fact]
    public void A_state_with_two_rows_is_refused()
    {
        var refusal = Refusal.Of(() => Chain.Build<string>(rows => rows.Row("a", ("a", 0.5)).Row("a", ("b", 0.5)).Row("b", ("a", 1.0))));

        var fault = refusal.Faults.Should().ContainSingle().Which;
        fault.Kind.Should().Be(ChainFaultKind.DuplicateState);
        fault.States.Should().Equal("a");
        fault.Value.Should().Be(1, "the second row given is at position 1");
        fault.Message.Should().Be("State 'a' is given two rows. Give all its moves in one.");
    }

    [Fact]
    public void A_row_for_a_null_state_is_refused_even_without_moves()
    {
        var fault = Refusal.OnlyFaultOf(() => Chain.Build<string>(rows => rows.Row("a", ("a", 1.0)).Row(null!)));

        fault.Kind.Should().Be(ChainFaultKind.NullState);
        fault.Message.Should().Be("Row number 2 is given for a null state. Give every state a label.");
    }

    [Fact]
    public void A_row_without_moves_is_refused()
    {
        var fault = Refusal.OnlyFaultOf(() => Chain.Build<string>(rows => rows.Row("a", ("b", 1.0)).Row("b")));

        fault.Kind.Should().Be(ChainFaultKind.EmptyRow);
        fault.States.Should().Equal("b");
    }

    [Fact]
    public void No_rows_at_all_are_refused()
    {
        Refusal.OnlyFaultOf(() => Chain.Build<string>(_ => { })).Kind.Should().Be(ChainFaultKind.NoStates);
    }

    [Fact]
    public void Rows_given_after_the_chain_is_built_are_refused_and_do_not_change_it()
    {
        ChainRows<string>? kept = null;
        var chain = Chain.Build<string>(rows => kept = rows.Row("a", ("a", 1.0)));

        FluentActions.Invoking(() => kept!.Row("late", ("late", 1.0))).Should().Throw<InvalidOperationException>()
            .WithMessage("The chain has been built already. Give its rows inside the call of Chain.Build.");
        chain.States.Contains("late").Should().BeFalse();
    }

    [Fact]
    public void An_exception_of_the_caller_s_own_code_comes_through()
    {
        FluentActions.Invoking(() => Chain.Build<string>(_ => throw new TimeoutException("mine"))).Should().Throw<TimeoutException>().WithMessage("mine");
    }

    [Fact]
    public void Missing_arguments_are_refused()
    {
        FluentActions.Invoking(() => Chain.Build<string>(null!)).Should().Throw<ArgumentNullException>().WithParameterName("rows");
        FluentActions.Invoking(() => Chain.Build<string>(_ => { }, null!)).Should().Throw<ArgumentNullException>().WithParameterName("options");
    }
}
