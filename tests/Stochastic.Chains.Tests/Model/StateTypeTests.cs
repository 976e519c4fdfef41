using System.Diagnostics.CodeAnalysis;
using MathNet.Numerics.LinearAlgebra;
using Stochastic.Chains.Tests.Support;

namespace Stochastic.Chains.Tests.Model;

/// <summary>Any type with equality can be a state, with its own or a given equality, good or bad.</summary>
public class StateTypeTests
{
    [Fact]
    public void An_enum_is_found_by_name_and_its_default_value_is_a_state_like_any_other()
    {
        var chain = TwoStates(Stage.Failed, default);

        chain[Stage.Failed, Stage.New].Should().Be(1);
        FluentActions.Invoking(() => chain.Row(Stage.Worn)).Should().Throw<UnknownStateException>().WithMessage("'Worn' is not one of *'Failed', 'New'*");
    }

    [Fact]
    public void A_record_is_found_by_value()
    {
        var chain = TwoStates(new Bin("A", 1), new Bin("A", 2));

        chain[new Bin("A", 1), new Bin("A", 2)].Should().Be(1);
        chain.States.IndexOf(new Bin("A", 2)).Should().Be(1);
        FluentActions.Invoking(() => chain.Row(new Bin("B", 1))).Should().Throw<UnknownStateException>()
            .Which.State.Should().Be("Bin { Aisle = B, Shelf = 1 }");
    }

    [Fact]
    public void Numbers_are_states_by_value_and_never_positions()
    {
        var chain = TwoStates(1, 0);

        chain.States.Should().Equal(1, 0);
        chain.Row(1).Values.ToArray().Should().Equal(0, 1);
        chain.Row(1)[0].Should().Be(1, "the row leads to the state 0, which stands second");
        FluentActions.Invoking(() => chain.Row(2)).Should().Throw<UnknownStateException>();
    }

    [Fact]
    public void Tuples_and_dates_are_states_too()
    {
        TwoStates(("a", 1), ("a", 2))[("a", 1), ("a", 2)].Should().Be(1);
        TwoStates(new DateOnly(2026, 1, 31), new DateOnly(2026, 2, 1)).States.ToString().Should().Be("2 states: '01/31/2026', '02/01/2026'");
    }

    [Fact]
    public void Strings_are_told_apart_exactly_unless_a_comparer_says_otherwise()
    {
        var options = new ChainOptions<string> { Comparer = StringComparer.OrdinalIgnoreCase };
        Transition<string>[] moves = [new("up", "down", 1), new("UP", "DOWN", 1), new("down", "up", 1), new("DOWN", "UP", 1)];

        Chain.FromTransitions(moves).StateCount.Should().Be(4);
        Refusal.Of(() => Chain.FromTransitions(moves, options)).Faults.Select(fault => fault.Kind).Distinct()
            .Should().BeEquivalentTo([ChainFaultKind.DuplicateTransition, ChainFaultKind.RowSum]);
    }

    [Fact]
    public void A_comparer_is_never_asked_about_null()
    {
        var comparer = EqualityComparer<string>.Create(
            (x, y) => x is null || y is null ? throw new InvalidOperationException("null") : x == y,
            state => state is null ? throw new InvalidOperationException("null") : state.Length);
        var options = new ChainOptions<string> { Comparer = comparer };

        var chain = Chain.FromMatrix(["a", "b"], new[,] { { 0.0, 1 }, { 1, 0 } }, options);

        chain.States.Contains(null!).Should().BeFalse();
        FluentActions.Invoking(() => chain.Row(null!)).Should().Throw<UnknownStateException>();
        Refusal.Of(() => Chain.FromMatrix(["a", null!], new[,] { { 0.0, 1 }, { 1, 0 } }, options)).Faults.Should().ContainSingle();
        Refusal.Of(() => Chain.FromTransitions(["a", null!], [new Transition<string>(null!, "a", 1)], options)).FaultCount.Should().Be(3);
        Refusal.Of(() => Chain.Build(rows => rows.Row(null!, ("a", 1.0)).Row("a", (null!, 1.0)), options)).FaultCount.Should().Be(2);
    }

    [Fact]
    public void With_a_comparer_for_which_nothing_equals_itself_no_state_is_found_and_no_number_is_mixed_up()
    {
        var options = new ChainOptions<string> { Comparer = new NothingEqualComparer() };
        double[,] table = { { 0, 1 }, { 0.5, 0.5 } };

        var dense = Chain.FromMatrix(["a", "b"], table, options);
        var sparse = Chain.FromMatrix(["a", "b"], Matrix<double>.Build.SparseOfArray(table), options);

        dense.ToArray().Should().BeEquivalentTo(table);
        sparse.ToArray().Should().BeEquivalentTo(table);
        FluentActions.Invoking(() => dense["a", "b"]).Should().Throw<UnknownStateException>();
        Refusal.Of(() => Chain.FromTransitions([new("a", "b", 1), new Transition<string>("b", "a", 1)], options))
            .Faults.Should().Contain(fault => fault.Kind == ChainFaultKind.EmptyRow, "each label counts as a new state");
    }

    [Fact]
    public void With_a_comparer_for_which_everything_is_equal_there_is_one_state()
    {
        var options = new ChainOptions<string> { Comparer = EqualityComparer<string>.Create((_, _) => true, _ => 0) };

        Refusal.OnlyFaultOf(() => Chain.FromMatrix(["a", "b"], new[,] { { 0.0, 1 }, { 1, 0 } }, options)).Kind.Should().Be(ChainFaultKind.DuplicateState);
        Chain.FromTransitions([new Transition<string>("a", "b", 1)], options).StateCount.Should().Be(1);
    }

    [Fact]
    public void An_exception_of_the_comparer_comes_through()
    {
        var options = new ChainOptions<string> { Comparer = EqualityComparer<string>.Create((_, _) => true, _ => throw new TimeoutException("mine")) };

        FluentActions.Invoking(() => Chain.FromTransitions([new Transition<string>("a", "b", 1)], options)).Should().Throw<TimeoutException>().WithMessage("mine");
    }

    [Fact]
    public void Defaults_stand_as_documented_and_null_options_are_refused_where_they_are_set()
    {
        var options = new ChainOptions<string>();

        options.Comparer.Should().BeSameAs(EqualityComparer<string>.Default);
        options.RowSums.Should().BeSameAs(RowSums.MustBeOne);
        FluentActions.Invoking(() => new ChainOptions<string> { Comparer = null! }).Should().Throw<ArgumentNullException>();
        FluentActions.Invoking(() => options with { RowSums = null! }).Should().Throw<ArgumentNullException>();
    }

    private static Chain<TState> TwoStates<TState>(TState first, TState second)
        where TState : notnull => Chain.FromMatrix([first, second], new[,] { { 0.0, 1 }, { 1, 0 } });

    private sealed record Bin(string Aisle, int Shelf);

    private sealed class NothingEqualComparer : IEqualityComparer<string>
    {
        public bool Equals(string? x, string? y) => false;

        public int GetHashCode([DisallowNull] string obj) => 0;
    }
}
