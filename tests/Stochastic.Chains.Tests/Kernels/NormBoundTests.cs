using Stochastic.Chains.Kernels;
using Stochastic.Chains.Tests.Support;

namespace Stochastic.Chains.Tests.Kernels;

public class NormBoundTests
{
    private const int ChainsPerFamily = 60;
    private const int LargestSize = 24;
    private const double UnitRoundoff = 1.1102230246251565e-16;
    private const double UsefulFactor = 1e4;

    public static TheoryData<string> Families => StationaryTrial.Families;

    [Theory]
    [MemberData(nameof(Families))]
    public void The_residual_bounds_the_distance_with_times_to_a_reference_state(string family)
    {
        foreach (var sample in ChainFamilies.Named(family).Samples(ChainsPerFamily, LargestSize))
        {
            var trial = new StationaryTrial(sample);
            if (!trial.IsInRange || trial.Count == 1)
            {
                continue;
            }

            var reference = trial.StatesByShare[^1];
            var times = Array.ConvertAll(sample.ToExact().HittingMean(reference), mean => mean!.Value.ToDouble());
            foreach (var values in new[] { trial.Rounded(), trial.WrongInBlock(1e-3) })
            {
                var bound = VectorResidual.Of(trial.Dense, trial.States, values).ErrorBound(MonotoneResidual.Amplification(trial.Dense, trial.States, reference, times));
                Distance(trial, values).Should().BeLessThanOrEqualTo(bound, "{0}", trial);
            }
        }
    }

    [Fact]
    public void The_residual_bound_is_useful_for_well_connected_chains()
    {
        foreach (var trial in StationaryTrial.Of("random dense"))
        {
            var reference = trial.StatesByShare[^1];
            var longTimes = Enumerable.Range(0, trial.Count).Select(state => state == reference ? 0 : 20.0 * trial.Count).ToArray();
            foreach (var values in new[] { trial.Rounded(), trial.WrongInBlock(1e-9) })
            {
                var distance = Distance(trial, values);
                var residual = VectorResidual.Of(trial.Dense, trial.States, values);
                double[] bounds =
                [
                    residual.ErrorBound(MonotoneResidual.Amplification(trial.Dense, trial.States, reference, longTimes)),
                    residual.ErrorBound(Contraction.Amplification(trial.Dense, trial.States)),
                    VectorResidual.Of(trial.Sparse, trial.States, values).ErrorBound(Contraction.Amplification(trial.Sparse, trial.States)),
                ];
                bounds.Should().OnlyContain(bound => bound >= distance && bound <= UsefulFactor * (distance + UnitRoundoff), "{0}", trial);
            }
        }
    }

    [Theory]
    [InlineData(0)]
    [InlineData(-100)]
    [InlineData(double.NaN)]
    public void Times_that_prove_nothing_give_no_bound(double time)
    {
        var rows = new DenseRates([0.5, 0.25, 0.25, 0.25, 0.5, 0.25, 0.25, 0.25, 0.5], 3);
        MonotoneResidual.Amplification(rows, [0, 1, 2], 2, [time, time, 0]).Should().Be(double.PositiveInfinity);
    }

    [Fact]
    public void A_chain_without_shared_mass_has_no_contraction_bound()
    {
        var rows = new DenseRates([0, 1, 0, 0, 0, 1, 1, 0, 0], 3);
        const double Third = 1.0 / 3;
        Contraction.SharedMass(rows, [0, 1, 2]).Should().BeLessThanOrEqualTo(0);
        Contraction.Amplification(rows, [0, 1, 2]).Should().Be(double.PositiveInfinity);
        VectorResidual.Of(rows, [0, 1, 2], [Third, Third, Third]).ErrorBound(double.PositiveInfinity).Should().Be(double.PositiveInfinity);
    }

    private static double Distance(StationaryTrial trial, double[] values) =>
        Rational.Sum(trial.Exact.Zip(values, (share, value) => Rational.Abs(Rational.FromDouble(value) - share))).ToDouble();
}
