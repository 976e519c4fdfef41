using Stochastic.Chains.Kernels;
using ScaledDoubleDouble = Stochastic.Chains.Kernels.ScaledDoubleDouble;

namespace Stochastic.Chains.Tests.Kernels;

public class DoubledEliminationTests
{
    private const double UnitRoundoff = 1.1102230246251565e-16;

    public static TheoryData<string> Families => StationaryTrial.Families;

    [Theory]
    [MemberData(nameof(Families))]
    public void Every_share_is_the_true_one_rounded(string family)
    {
        foreach (var trial in StationaryTrial.Of(family))
        {
            var bound = DoubledElimination.RelativeErrorBound(trial.Count - 1, trial.Count, merges: 0);
            bound.Should().BeLessThan(1.001 * UnitRoundoff);
            var table = trial.Table.Select(rate => (ScaledDoubleDouble)rate).ToArray();
            var reduction = new GeneralReduction<ScaledDoubleDouble>(table, trial.Count, trial.Count, trial.Count - 1);
            reduction.Eliminate(null, CancellationToken.None);
            trial.TrueError(Shares(reduction, trial.Count)).Should().BeLessThanOrEqualTo(bound, "{0}", trial);

            table = [.. trial.Table.Select(rate => (ScaledDoubleDouble)rate)];
            var vectors = new GeneralReduction<ScaledDoubleDouble>(table, trial.Count, trial.Count, trial.Count - 1);
            if (DoubledElimination.TryEliminate(table, trial.Count, trial.Count, vectors.Sums, CancellationToken.None))
            {
                trial.TrueError(Shares(vectors, trial.Count)).Should().BeLessThanOrEqualTo(bound, "{0}", trial);
            }
        }
    }

    [Theory]
    [InlineData("random dense")]
    [InlineData("random sparse")]
    public void Ordinary_tables_take_the_fast_path(string family)
    {
        foreach (var trial in StationaryTrial.Of(family))
        {
            var table = trial.Table.Select(rate => (ScaledDoubleDouble)rate).ToArray();
            DoubledElimination.TryEliminate(table, trial.Count, trial.Count, new ScaledDoubleDouble[trial.Count - 1], CancellationToken.None)
                .Should().BeTrue("{0}", trial);
        }
    }

    [Fact]
    public void A_table_out_of_range_is_left_as_it_was()
    {
        ScaledDoubleDouble[] table = [0, 1e-200, 1e-200, 1e-200, 0, 1e-200, 1e-200, 1e-200, 0];
        var kept = table.ToArray();
        table[1] = kept[1] = (ScaledDoubleDouble)1e-300 * 1e-300;
        DoubledElimination.TryEliminate(table, 3, 3, new ScaledDoubleDouble[2], CancellationToken.None).Should().BeFalse();
        table.Should().Equal(kept);
    }

    private static double[] Shares(GeneralReduction<ScaledDoubleDouble> reduction, int count)
    {
        var weights = new ScaledDoubleDouble[count];
        weights[^1] = ScaledDoubleDouble.One;
        reduction.ExtendLeft(weights);
        var total = weights.Aggregate((sum, weight) => sum + weight);
        return [.. weights.Select(weight => (weight / total).ToDouble())];
    }
}
