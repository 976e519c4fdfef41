using Stochastic.Chains.Estimation;
using Stochastic.Chains.Kernels;
using Stochastic.Chains.Simulation;

namespace Stochastic.Chains.Confidence;

/// <summary>Draws chains that the counts allow: draw number k always gives the same chain.</summary>
internal sealed class ChainSampler<TState>(TransitionEstimate<TState> estimate, ConfidenceMethod method, long seed)
    where TState : notnull
{
    internal Chain<TState> Draw(int number)
    {
        var rows = estimate.Rows;
        var stream = new RandomNumbers(seed, number);
        var values = new double[rows.EntryCount];
        for (var row = 0; row < rows.RowCount; row++)
        {
            var target = values.AsSpan(rows.Starts[row], rows.Columns(row).Length);
            if (target.Length == 1)
            {
                target[0] = 1;
            }
            else if (method == ConfidenceMethod.PosteriorSampling)
            {
                DrawPosterior(stream, rows.Counts(row), rows.Weights(row), target);
            }
            else
            {
                DrawCounts(stream, rows.Counts(row), rows.Total(row), target);
            }
        }

        return new Chain<TState>(estimate.States, Assemble(rows, values), [], uniformizationRate: null);
    }

    private static void DrawPosterior(RandomNumbers stream, ReadOnlySpan<long> counts, ReadOnlySpan<double> weights, Span<double> target)
    {
        for (var k = 0; k < target.Length; k++)
        {
            target[k] = stream.NextGamma(counts[k] + weights[k]);
        }

        var sum = CompensatedSum.Of(target);
        foreach (ref var entry in target)
        {
            entry = Math.Max(double.Epsilon, entry / sum); // a possible move stays possible
        }
    }

    /// <summary>New counts with the same total: each move's given those before it is binomial.</summary>
    private static void DrawCounts(RandomNumbers stream, ReadOnlySpan<long> counts, long total, Span<double> target)
    {
        var (trials, rest) = (total, total);
        for (var k = 0; k < target.Length; k++)
        {
            var drawn = k == target.Length - 1 ? trials : stream.NextBinomial(trials, rest > 0 ? ExactRatio.Of(counts[k], rest) : 0);
            target[k] = ExactRatio.Of(drawn, total);
            trials -= drawn;
            rest -= counts[k];
        }
    }

    private static TransitionMatrix Assemble(EstimateRows rows, double[] values)
    {
        var (starts, columns, kept) = (new int[rows.RowCount + 1], new List<int>(values.Length), new List<double>(values.Length));
        for (var row = 0; row < rows.RowCount; row++)
        {
            for (var k = rows.Starts[row]; k < rows.Starts[row + 1]; k++)
            {
                if (values[k] > 0)
                {
                    columns.Add(rows.AllColumns[k]);
                    kept.Add(values[k]);
                }
            }

            starts[row + 1] = columns.Count;
        }

        return TransitionMatrix.FromCompressedRows(new CompressedRows(starts, [.. columns], [.. kept]));
    }
}
