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

    private static double Bound<TRows>(TRows rows, double[] values)
        where TRows : struct, IRateRows =>
        FlowBalance.RelativeErrorBound(rows, [.. Enumerable.Range(0, rows.Count)], values, Memory, CancellationToken.None);
}
