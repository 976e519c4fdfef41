using MathNet.Numerics.LinearAlgebra;
using Stochastic.Chains.Tests.Support;

namespace Stochastic.Chains.Tests.Model;

/// <summary>Each kind of fault, provoked; the faults that only some constructions know are provoked with those constructions.</summary>
public class ChainFaultTests
{
    private static readonly string[] UpDown = ["up", "down"];

    private static readonly Dictionary<ChainFaultKind, Func<Chain<string>>> Provocations = new()
    {
        [ChainFaultKind.NoStates] = () => Chain.FromTransitions<string>([]),
        [ChainFaultKind.NullState] = () => Chain.FromMatrix(["up", null!], Rows(1, 0, 0, 1)),
        [ChainFaultKind.DuplicateState] = () => Chain.FromMatrix(["up", "up"], Rows(1, 0, 0, 1)),
        [ChainFaultKind.UnknownState] = () => Chain.FromTransitions(["up"], [new Transition<string>("up", "down", 1)]),
        [ChainFaultKind.WrongShape] = () => Chain.FromMatrix(UpDown, new double[2, 3]),
        [ChainFaultKind.EmptyRow] = () => Chain.FromMatrix(UpDown, Rows(1, 0, 0, 0)),
        [ChainFaultKind.NotFinite] = () => Chain.FromMatrix(UpDown, Rows(double.NaN, 1, 0, 1)),
        [ChainFaultKind.Negative] = () => Chain.FromMatrix(UpDown, Rows(0.5, 0.5, -0.25, 1.0)),
        [ChainFaultKind.AboveOne] = () => Chain.FromMatrix(UpDown, Rows(1.5, 0, 0, 1)),
        [ChainFaultKind.RowSum] = () => Chain.FromMatrix(UpDown, Rows(0.5, 0.25, 0, 1)),
        [ChainFaultKind.DuplicateTransition] = () => Chain.FromTransitions([new("up", "up", 0.5), new Transition<string>("up", "up", 0.5)]),
        [ChainFaultKind.SelfRate] = () => Chain.FromRates([new TransitionRate<string>("up", "up", 1)]),
        [ChainFaultKind.RateOutOfRange] = () => Chain.FromRates([new("up", "down", 1e-300), new TransitionRate<string>("down", "up", 1e300)]),
        [ChainFaultKind.Unlisted] = () => Chain.FromTransitions(Enumerable.Range(0, 1001).Select(k => new Transition<string>($"{k}", $"{k}", 0.5))),
    };

    public static TheoryData<ChainFaultKind> Kinds => [.. Provocations.Keys];

    [Theory]
    [MemberData(nameof(Kinds))]
    public void Every_kind_of_fault_is_found_and_its_message_is_a_sentence_with_advice(ChainFaultKind kind)
    {
        var refusal = Refusal.Of(Provocations[kind]);

        var fault = refusal.Faults.Should().Contain(found => found.Kind == kind).Which;
        fault.Message.Should().EndWith(".").And.MatchRegex(@"\. [A-Z].*\.$", "what is wrong is followed by what to do");
        fault.ToString().Should().Be(fault.Message);
        foreach (var state in fault.States)
        {
            fault.Message.Should().Contain($"'{state}'");
        }
    }

    [Fact]
    public void Only_the_kinds_that_belong_to_counts_are_left_to_the_tests_of_estimation()
    {
        Enum.GetValues<ChainFaultKind>().Except(Provocations.Keys).Should().Equal(ChainFaultKind.UnobservedRow, ChainFaultKind.ImpossibleMove);
    }

    [Theory]
    [InlineData(2, 3)]
    [InlineData(3, 2)]
    [InlineData(0, 1)]
    public void A_matrix_that_is_not_square_is_refused_with_its_size(int rows, int columns)
    {
        var refusal = Refusal.Of(() => Chain.FromMatrix(new double[rows, columns]));

        refusal.Faults.Should().Contain(fault => fault.Kind == ChainFaultKind.WrongShape).Which.Message
            .Should().Contain($"{rows} row").And.Contain($"{columns} column");
    }

    [Theory]
    [InlineData("table")]
    [InlineData("dense")]
    [InlineData("sparse")]
    public void A_matrix_with_another_number_of_rows_than_states_is_refused_with_both_numbers(string kind)
    {
        var table = Rows(1, 0, 0, 1);
        string[] three = ["a", "b", "c"];

        var fault = Refusal.OnlyFaultOf(() => kind switch
        {
            "table" => Chain.FromMatrix(three, table),
            "dense" => Chain.FromMatrix(three, Matrix<double>.Build.DenseOfArray(table)),
            _ => Chain.FromMatrix(three, Matrix<double>.Build.SparseOfArray(table)),
        });

        fault.Kind.Should().Be(ChainFaultKind.WrongShape);
        fault.Value.Should().Be(3);
        fault.Message.Should().Be("There are 3 states for a matrix of 2 rows. Give one state for each row.");
    }

    [Fact]
    public void An_empty_matrix_is_refused_for_having_no_states()
    {
        Refusal.OnlyFaultOf(() => Chain.FromMatrix(new double[0, 0])).Kind.Should().Be(ChainFaultKind.NoStates);
    }

    [Theory]
    [InlineData(double.NaN, "NaN")]
    [InlineData(double.PositiveInfinity, "Infinity")]
    [InlineData(double.NegativeInfinity, "-Infinity")]
    public void A_probability_that_is_not_finite_is_refused(double value, string text)
    {
        var fault = Refusal.OnlyFaultOf(() => Chain.FromMatrix(UpDown, Rows(0.5, 0.5, value, 1)));

        fault.Kind.Should().Be(ChainFaultKind.NotFinite);
        fault.States.Should().Equal("down", "up");
        fault.Value.Should().Be(value);
        fault.Message.Should().Be($"The probability of 'down' to 'up' is {text}. Give a number from 0 to 1.");
    }

    [Fact]
    public void A_negative_probability_is_refused_even_in_a_row_that_sums_to_one()
    {
        var fault = Refusal.OnlyFaultOf(() => Chain.FromMatrix(["a", "b", "c"], new[,] { { -1e-20, 0.5, 0.5 }, { 1, 0, 0 }, { 1, 0, 0 } }));

        fault.Kind.Should().Be(ChainFaultKind.Negative);
        fault.States.Should().Equal("a", "a");
        fault.Value.Should().Be(-1e-20);
        fault.Message.Should().Contain("-1E-20, below zero");
    }

    [Fact]
    public void A_probability_above_one_is_refused_beside_the_sum_of_its_row()
    {
        var refusal = Refusal.Of(() => Chain.FromMatrix(UpDown, Rows(0, 1.5, 0, 1)));

        refusal.Faults.Select(fault => fault.Kind).Should().Equal(ChainFaultKind.AboveOne, ChainFaultKind.RowSum);
        refusal.Faults[0].Message.Should().Be("The probability of 'up' to 'down' is 1.5, above one. Give a number from 0 to 1.");
    }

    [Fact]
    public void Finite_probabilities_whose_sum_overflows_are_refused_one_by_one()
    {
        var refusal = Refusal.Of(() => Chain.FromMatrix(UpDown, Rows(double.MaxValue, double.MaxValue, 0, 1)));

        refusal.Faults.Select(fault => fault.Kind).Should().Equal(ChainFaultKind.AboveOne, ChainFaultKind.AboveOne);
    }

    [Fact]
    public void A_row_of_zeros_is_refused_by_the_name_of_its_state()
    {
        var fault = Refusal.OnlyFaultOf(() => Chain.FromMatrix(UpDown, Rows(1, 0, 0, -0.0)));

        fault.Kind.Should().Be(ChainFaultKind.EmptyRow);
        fault.States.Should().Equal("down");
    }

    [Fact]
    public void A_row_that_sums_to_less_is_refused_with_its_sum_and_the_rescaling_that_would_do()
    {
        var fault = Refusal.OnlyFaultOf(() => Chain.FromMatrix(UpDown, Rows(0.5, 0.25, 0, 1)));

        fault.Kind.Should().Be(ChainFaultKind.RowSum);
        fault.States.Should().Equal("up");
        fault.Value.Should().Be(0.75);
        fault.Message.Should().Be(
            "The row of 'up' sums to 0.75, 0.25 below one. Correct its probabilities, or allow a rescaling with RowSums.Rescale of 0.25 or more.");
    }

    [Fact]
    public void A_row_of_percentages_is_not_told_to_rescale()
    {
        var refusal = Refusal.Of(() => Chain.FromMatrix(UpDown, Rows(50, 50, 0, 1)));

        refusal.Faults[^1].Message.Should().Be("The row of 'up' sums to 100, 99 above one. Correct its probabilities: they are parts of 1.");
    }

    [Fact]
    public void A_move_given_twice_is_refused_whatever_stands_between_and_however_often()
    {
        var refusal = Refusal.Of(() => Chain.FromTransitions(
        [
            new("a", "b", 0.25), new("b", "a", 1.0), new("a", "a", 0.25), new("a", "b", 0.25), new Transition<string>("a", "b", 0.25),
        ]));

        refusal.Faults.Should().HaveCount(2).And.OnlyContain(fault => fault.Kind == ChainFaultKind.DuplicateTransition);
        refusal.Faults[0].States.Should().Equal("a", "b");
        refusal.Faults[0].Message.Should().Be("The move 'a' to 'b' is given more than once. Give it once, with its whole probability.");
    }

    [Fact]
    public void Numbers_in_messages_are_the_same_in_every_culture()
    {
        using var culture = new CommaCulture();

        Refusal.OnlyFaultOf(() => Chain.FromMatrix([0.5, 1.5], Rows(0.5, 0.25, 0, 1))).Message.Should().StartWith("The row of '0.5' sums to 0.75, 0.25 below one.");
    }

    private static double[,] Rows(double a, double b, double c, double d) => new[,] { { a, b }, { c, d } };
}
