using Stochastic.Chains.Kernels;

namespace Stochastic.Chains.Tests.Kernels;

public class FlowBalanceTests
{
    private const double UnitRoundoff = 1.1102230246251565e-16;
    private const double UsefulFactor = 1e4;
    private const long Memory = 1 << 30;

    public static TheoryData<string> Families => StationaryTrial.Families;

    [Theory]
    [MemberData(nameof(Families))]
    public void The_bound_is_never_wrong_and_useful(string family)
    {
        foreach (var trial in StationaryTrial.Of(family))
        {
            foreach (var values in new[] { trial.Rounded(), trial.Reduced(), trial.WrongInBlock(1e-9) })
            {
                var bound = Bound(trial.Dense, values);
                var error = trial.TrueError(values);
                bound.Should().BeGreaterThanOrEqualTo(error, "{0}", trial);
                bound.Should().BeLessThanOrEqualTo(UsefulFactor * (error + UnitRoundoff), "{0}", trial);
                Bound(trial.Sparse, values).Should().BeApproximately(bound, (bound / 10) + UnitRoundoff, "{0}", trial);
            }
        }
    }

    [Theory]
    [MemberData(nameof(Families))]
    public void The_bound_covers_a_vector_that_is_wrong_by_a_thousandth(string family)
    {
        foreach (var trial in StationaryTrial.Of(family))
        {
            var values = trial.WrongInBlock(1e-3);
            Bound(trial.Dense, values).Should().BeGreaterThanOrEqualTo(trial.TrueError(values), "{0}", trial);
        }
    }

    [Theory]
    [InlineData(0)]
    [InlineData(-0.25)]
    [InlineData(double.NaN)]
    [InlineData(double.PositiveInfinity)]
    public void A_vector_that_is_not_positive_and_finite_has_no_bound(double value) =>
        Bound(TwoStates, [0.5, value]).Should().Be(double.PositiveInfinity);

    [Fact]
    public void A_vector_that_is_off_by_a_multiple_has_no_bound_or_a_wide_one() =>
        Bound(TwoStates, [0.9, 0.1]).Should().BeGreaterThanOrEqualTo(1.7);

    [Fact]
    public void The_sum_counts() =>
        Bound(TwoStates, [0.25, 0.75 + 1e-6]).Should().BeInRange(1e-6, 1e-5);

    [Fact]
    public void An_exact_vector_has_almost_no_error() =>
        Bound(TwoStates, [0.25, 0.75]).Should().BeLessThan(UnitRoundoff / 100);

    [Fact]
    public void A_single_state_needs_no_flow() => Bound(new DenseRates([1], 1), [1]).Should().Be(0);

    [Fact]
    public void States_outside_the_class_do_not_count()
    {
        var rows = new DenseRates([0.2, 0.3, 0.5, 0, 0.25, 0.75, 0, 0.25, 0.75], 3);
        FlowBalance.RelativeErrorBound(rows, [1, 2], [0, 0.25, 0.75], Memory, CancellationToken.None).Should().BeLessThan(UnitRoundoff);
    }

    [Fact]
    public void Too_little_memory_for_the_sums_gives_no_bound() =>
        FlowBalance.RelativeErrorBound(TwoStates, [0, 1], [0.25, 0.75], memoryLimit: 8, CancellationToken.None).Should().Be(double.PositiveInfinity);

    [Fact]
    public void States_that_no_flow_joins_give_no_bound() =>
        Bound(new DenseRates([1, 0, 0, 1], 2), [0.5, 0.5]).Should().Be(double.PositiveInfinity);

    [Fact]
    public void Cancellation_is_noticed()
    {
        var act = () => FlowBalance.RelativeErrorBound(TwoStates, [0, 1], [0.25, 0.75], Memory, new CancellationToken(canceled: true));
        act.Should().Throw<OperationCanceledException>();
    }

    /// <summary>Its stationary distribution is (1/4, 3/4).</summary>
    private static DenseRates TwoStates => new([0.25, 0.75, 0.25, 0.75], 2);

    private static double Bound<TRows>(TRows rows, double[] values)
        where TRows : struct, IRateRows =>
        FlowBalance.RelativeErrorBound(rows, [.. Enumerable.Range(0, rows.Count)], values, Memory, CancellationToken.None);
}
