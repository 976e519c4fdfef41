using Stochastic.Chains.Kernels;

namespace Stochastic.Chains.Estimation;

/// <summary>
/// What is estimated: in compressed rows the moves that have a weight, each with its count and its prior weight, and for each row the number of
/// possible moves. Without a prior only the counted moves are held; with one, all that are possible.
/// </summary>
internal sealed class EstimateRows(int[] starts, int[] columns, long[] counts, double[] weights, int[] possibleMoves)
{
    internal int RowCount => starts.Length - 1;

    internal ReadOnlySpan<int> Columns(int row) => columns.AsSpan(starts[row], starts[row + 1] - starts[row]);

    internal ReadOnlySpan<long> Counts(int row) => counts.AsSpan(starts[row], starts[row + 1] - starts[row]);

    internal ReadOnlySpan<double> Weights(int row) => weights.AsSpan(starts[row], starts[row + 1] - starts[row]);

    /// <summary>How many moves out of a state can happen; 1 where there is nothing to estimate.</summary>
    internal int PossibleMoves(int row) => possibleMoves[row];

    internal int[] Starts => starts;

    internal int[] AllColumns => columns;

    internal int EntryCount => columns.Length;

    internal long Total(int row)
    {
        var total = 0L;
        foreach (var count in Counts(row))
        {
            total += count;
        }

        return total;
    }

    internal double WeightTotal(int row) => CompensatedSum.Of(Weights(row));

    /// <summary>The position of a move in its row, or −1.</summary>
    internal int Find(int row, int column) => Columns(row).BinarySearch(column);

    /// <summary>The estimated probabilities: (count + weight) / (total + weights), correctly rounded where there are no weights.</summary>
    internal TransitionMatrix ToMatrix()
    {
        var values = new double[columns.Length];
        for (var row = 0; row < RowCount; row++)
        {
            var (total, weight) = (Total(row), WeightTotal(row));
            for (var k = starts[row]; k < starts[row + 1]; k++)
            {
                values[k] = starts[row + 1] - starts[row] == 1 ? 1
                    : weight == 0 ? ExactRatio.Of(counts[k], total)
                    : (counts[k] + weights[k]) / (total + weight);
            }
        }

        return TransitionMatrix.FromCompressedRows(new CompressedRows([.. starts], [.. columns], values));
    }
}
