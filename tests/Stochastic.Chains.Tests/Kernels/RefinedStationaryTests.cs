using Stochastic.Chains.Kernels;

namespace Stochastic.Chains.Tests.Kernels;

public class RefinedStationaryTests
{
    private const double UnitRoundoff = 1.1102230246251565e-16;
    private const double ProvedUnits = 4;

    public static TheoryData<string> Families => StationaryTrial.Families;

    [Theory]
    [MemberData(nameof(Families))]
    public void The_bound_is_never_wrong_and_four_units_where_refinement_contracts(string family)
    {
        foreach (var trial in StationaryTrial.Of(family))
        {
            if (trial.Count == 1)
            {
                continue;
            }

            var order = trial.StatesByShare;
            var table = trial.TableInOrder(order);
            var factors = new PlainFactors(table, trial.Count, trial.Count, trial.Count - 1);
            var solveError = SubtractionFreeBound.OfElimination(trial.Count - 1, trial.Count, merges: 0);
            foreach (var start in new[] { trial.Reduced(), trial.WrongInBlock(1e-3) })
            {
                var (dense, sparse) = (start.ToArray(), start.ToArray());
                var bound = RefinedStationary.Refine(trial.Dense, order, dense, factors, solveError, RefinementReach.LastDigits, CancellationToken.None);
                var sparseBound = RefinedStationary.Refine(trial.Sparse, order, sparse, factors, solveError, RefinementReach.LastDigits, CancellationToken.None);
                Check(trial, start, dense, bound);
                Check(trial, start, sparse, sparseBound);
            }
        }
    }

    private static void Check(StationaryTrial trial, double[] start, double[] refined, double bound)
    {
        trial.TrueError(refined).Should().BeLessThanOrEqualTo(bound, "{0}", trial);
        if (double.IsPositiveInfinity(bound))
        {
            refined.Should().Equal(start, "{0}", trial);
        }

        if (trial.JumpsToLargest * UnitRoundoff < 1.0 / 16)
        {
            bound.Should().BeLessThanOrEqualTo(ProvedUnits * UnitRoundoff, "{0}: {1} jumps", trial, trial.JumpsToLargest);
        }
    }
}
