using Stochastic.Chains.Tests.Support;

namespace Stochastic.Chains.Tests.Model;

public class RowSumTests
{
    [Theory]
    [InlineData(1)]
    [InlineData(2)]
    [InlineData(10)]
    [InlineData(999)]
    [InlineData(1000)]
    public void The_tolerance_is_ten_to_the_minus_twelve_for_each_transition_of_the_row(int transitions)
    {
        var tolerance = 1e-12 * transitions;

        Accepts(transitions, deviation: 0.99 * tolerance).Should().BeTrue();
        Accepts(transitions, deviation: -0.99 * tolerance).Should().BeTrue();
        Accepts(transitions, deviation: 1.01 * tolerance).Should().BeFalse();
        Accepts(transitions, deviation: -1.01 * tolerance).Should().BeFalse();
    }

    [Theory]
    [InlineData(1001)]
    [InlineData(5000)]
    public void The_tolerance_is_never_above_ten_to_the_minus_nine(int transitions)
    {
        Accepts(transitions, deviation: 0.99e-9).Should().BeTrue();
        Accepts(transitions, deviation: 1.01e-9).Should().BeFalse();
    }

    [Fact]
    public void Decimal_input_is_taken_as_it_is_written()
    {
        foreach (var count in new[] { 3, 7, 10, 30, 100, 1000 })
        {
            var share = 1.0 / count;
            var row = Enumerable.Repeat(share, count).ToArray();

            ChainWithFirstRow(row)[0, count - 1].Should().Be(share);
        }
    }

    [Fact]
    public void Only_entries_that_are_transitions_widen_the_tolerance()
    {
        var row = new double[500];
        row[3] = 1 + 1.5e-12;

        FluentActions.Invoking(() => ChainWithFirstRow(row)).Should().Throw<InvalidChainException>();
    }

    [Fact]
    public void A_sum_within_the_tolerance_is_not_rescaled_and_not_recorded()
    {
        var options = new ChainOptions<int> { RowSums = RowSums.Rescale(0.1) };
        var given = 0.5 + 4e-13;

        var chain = Chain.FromMatrix(new[,] { { given, 0.5 }, { 0, 1 } }, options);

        chain[0, 0].Should().Be(given);
        chain.RescaledRows.Should().BeEmpty();
    }

    [Fact]
    public void Rescaling_divides_by_the_sum_and_records_each_row_with_its_sum()
    {
        var options = new ChainOptions<string> { RowSums = RowSums.Rescale(0.05) };

        var chain = Chain.FromMatrix(["a", "b", "c"], new[,] { { 0.33, 0.33, 0.33 }, { 0.5, 0.5, 0 }, { 0.5, 0.25, 0.28125 } }, options);

        chain["a", "b"].Should().Be(0.33 / (0.33 + 0.33 + 0.33));
        chain["b", "a"].Should().Be(0.5);
        chain["c", "c"].Should().Be(0.28125 / 1.03125);
        chain.RescaledRows.Select(row => row.State).Should().Equal("a", "c");
        chain.RescaledRows[0].Deviation.Should().BeApproximately(-0.01, 1e-15);
        chain.RescaledRows[1].Sum.Should().Be(1.03125);
        chain.RescaledRows[1].Deviation.Should().Be(0.03125);
    }

    [Theory]
    [InlineData("build")]
    [InlineData("moves")]
    [InlineData("matrix")]
    public void Rescaling_is_recorded_by_every_construction(string construction)
    {
        var options = new ChainOptions<string> { RowSums = RowSums.Rescale(0.5) };
        Transition<string>[] moves = [new("a", "b", 0.75), new("b", "a", 1)];

        var chain = construction switch
        {
            "build" => Chain.Build(rows => rows.Row("a", ("b", 0.75)).Row("b", ("a", 1.0)), options),
            "moves" => Chain.FromTransitions(moves, options),
            _ => Chain.FromMatrix(["a", "b"], new[,] { { 0, 0.75 }, { 1, 0 } }, options),
        };

        chain.RescaledRows.Should().Equal(new RescaledRow<string>("a", 0.75));
        (chain.RescaledRows is IList<RescaledRow<string>> { IsReadOnly: false }).Should().BeFalse("a caller could change the chain through it");
        chain["a", "b"].Should().Be(1);
    }

    [Theory]
    [InlineData(0.6, 0.5, 0.1)]
    [InlineData(0.4, 0.5, 0.1)]
    [InlineData(0.69, 0.3, 0.01)]
    [InlineData(0.71, 0.3, 0.01)]
    public void A_deviation_that_reads_as_the_limit_is_within_it(double first, double second, double limit)
    {
        var options = new ChainOptions<int> { RowSums = RowSums.Rescale(limit) };

        Chain.FromMatrix(new[,] { { first, second }, { 0, 1 } }, options).RescaledRows.Should().ContainSingle();
    }

    [Fact]
    public void A_deviation_above_the_limit_is_refused()
    {
        var options = new ChainOptions<int> { RowSums = RowSums.Rescale(0.1) };

        var fault = Refusal.OnlyFaultOf(() => Chain.FromMatrix(new[,] { { 0.6, 0.51 }, { 0, 1 } }, options));

        fault.Kind.Should().Be(ChainFaultKind.RowSum);
    }

    [Theory]
    [InlineData(0.12341)]
    [InlineData(1e-11)]
    [InlineData(0.333333)]
    [InlineData(0.98)]
    public void The_rescaling_that_a_refusal_advises_is_enough(double missing)
    {
        double[,] matrix = { { 1 - missing, 0 }, { 0, 1 } };
        var advice = Refusal.OnlyFaultOf(() => Chain.FromMatrix(matrix)).Message.Split("RowSums.Rescale of ")[1].Split(' ')[0];
        var limit = double.Parse(advice, System.Globalization.CultureInfo.InvariantCulture);

        Chain.FromMatrix(matrix, new ChainOptions<int> { RowSums = RowSums.Rescale(limit) }).RescaledRows.Should().ContainSingle();
        limit.Should().BeLessThan(missing * 1.002);
    }

    [Fact]
    public void A_row_of_zeros_never_passes()
    {
        var options = new ChainOptions<int> { RowSums = RowSums.Rescale(Math.BitDecrement(1)) };

        Refusal.OnlyFaultOf(() => Chain.FromMatrix(new[,] { { 1.0, 0 }, { 0, 0 } }, options)).Kind.Should().Be(ChainFaultKind.EmptyRow);
    }

    [Fact]
    public void A_negative_probability_never_passes_by_rescaling()
    {
        var options = new ChainOptions<int> { RowSums = RowSums.Rescale(0.9) };

        Refusal.OnlyFaultOf(() => Chain.FromMatrix(new[,] { { 1.0, -0.25 }, { 0, 1 } }, options)).Kind.Should().Be(ChainFaultKind.Negative);
    }

    [Fact]
    public void Rescaling_never_loses_a_transition_however_small()
    {
        var options = new ChainOptions<int> { RowSums = RowSums.Rescale(0.99) };

        var chain = Chain.FromMatrix(new[,] { { 1.98, double.Epsilon }, { 0, 1 } }, options);

        chain.TransitionCount.Should().Be(3);
        chain[0, 1].Should().Be(double.Epsilon);
    }

    [Theory]
    [InlineData(0)]
    [InlineData(-0.1)]
    [InlineData(1)]
    [InlineData(double.NaN)]
    [InlineData(double.PositiveInfinity)]
    public void A_limit_outside_zero_to_one_is_refused(double limit)
    {
        FluentActions.Invoking(() => RowSums.Rescale(limit)).Should().Throw<ArgumentOutOfRangeException>()
            .WithMessage("*above 0 and below 1*").Which.ActualValue.Should().Be(limit);
    }

    [Fact]
    public void The_policy_shows_its_limit_and_compares_by_value()
    {
        RowSums.MustBeOne.MaxDeviation.Should().Be(0);
        RowSums.Rescale(0.25).MaxDeviation.Should().Be(0.25);
        RowSums.Rescale(0.25).Should().Be(RowSums.Rescale(0.25));
    }

    private static bool Accepts(int transitions, double deviation)
    {
        var row = Enumerable.Repeat(1.0 / transitions, transitions).ToArray();
        row[0] += deviation;
        var moves = row.Select((value, column) => new Transition<int>(0, column, value))
            .Concat(Enumerable.Range(1, transitions - 1).Select(state => new Transition<int>(state, 0, 1)));
        return Chain.TryFromTransitions(moves, out _, out _);
    }

    private static Chain<int> ChainWithFirstRow(double[] row)
    {
        var matrix = new double[row.Length, row.Length];
        for (var k = 0; k < row.Length; k++)
        {
            matrix[0, k] = row[k];
            matrix[k, k] = k == 0 ? row[0] : 1;
        }

        return Chain.FromMatrix(matrix);
    }
}
