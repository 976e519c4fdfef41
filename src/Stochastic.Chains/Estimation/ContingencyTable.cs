using Stochastic.Chains.Kernels;

namespace Stochastic.Chains.Estimation;

/// <summary>
/// A table of counts whose rows are asked whether they share one distribution. Rows and columns without a count are left out, for they say nothing.
/// All sums are of non-negative terms: an expected count is row total · column total / total, and the deviation from it is exact in whole numbers.
/// </summary>
internal sealed class ContingencyTable
{
    private const double SeriesReach = 0.1;
    private const int SeriesTerms = 20; // 0.1^20 / 380 is far below a rounding of the first term, δ²/2

    private readonly long[,] _counts;
    private readonly long[] _rowTotals;
    private readonly long[] _columnTotals;

    internal ContingencyTable(string name, IReadOnlyList<string> rowLabels, IReadOnlyList<string> columnLabels, long[,] counts)
    {
        var (rows, columns) = (counts.GetLength(0), counts.GetLength(1));
        (Name, RowLabels, ColumnLabels, _counts) = (name, rowLabels, columnLabels, counts);
        (_rowTotals, _columnTotals) = (new long[rows], new long[columns]);
        for (var row = 0; row < rows; row++)
        {
            for (var column = 0; column < columns; column++)
            {
                _rowTotals[row] = checked(_rowTotals[row] + counts[row, column]);
                _columnTotals[column] += counts[row, column];
                Total = checked(Total + counts[row, column]);
            }
        }

        UsedRows = [.. Enumerable.Range(0, rows).Where(row => _rowTotals[row] > 0)];
        UsedColumns = [.. Enumerable.Range(0, columns).Where(column => _columnTotals[column] > 0)];
    }

    internal string Name { get; }

    internal IReadOnlyList<string> RowLabels { get; }

    internal IReadOnlyList<string> ColumnLabels { get; }

    internal int[] UsedRows { get; }

    internal int[] UsedColumns { get; }

    internal long Total { get; }

    internal long DegreesOfFreedom => Total == 0 ? 0 : (UsedRows.Length - 1L) * (UsedColumns.Length - 1L);

    internal long Count(int row, int column) => _counts[row, column];

    internal long RowTotal(int row) => _rowTotals[row];

    internal long ColumnTotal(int column) => _columnTotals[column];

    internal double Expected(int row, int column) => (double)_rowTotals[row] * _columnTotals[column] / Total;

    /// <summary>(observed − expected) / expected, the difference exact.</summary>
    internal double Deviation(int row, int column)
    {
        var product = (Int128)_rowTotals[row] * _columnTotals[column];
        return (double)(((Int128)_counts[row, column] * Total) - product) / (double)product;
    }

    /// <summary>The share of a cell in half the likelihood ratio: O ln(O/E) − (O − E), which is not negative and sums to the same, as ΣO = ΣE.</summary>
    internal double HalfLikelihoodRatio(int row, int column) => Expected(row, column) * Excess(Deviation(row, column));

    /// <summary>The largest log-likelihood of the counts when all rows share one distribution.</summary>
    internal double PooledLogLikelihood()
    {
        var sum = default(CompensatedSum);
        foreach (var column in UsedColumns)
        {
            sum.Add(LogLikelihood.Of(_columnTotals[column], Total));
        }

        return sum.Value;
    }

    /// <summary>The largest log-likelihood of the counts when each row has its own distribution.</summary>
    internal double SeparateLogLikelihood()
    {
        var sum = default(CompensatedSum);
        foreach (var row in UsedRows)
        {
            foreach (var column in UsedColumns)
            {
                sum.Add(LogLikelihood.Of(_counts[row, column], _rowTotals[row]));
            }
        }

        return sum.Value;
    }

    /// <summary>(1 + δ) ln(1 + δ) − δ ≥ 0, for δ ≥ −1; near 0 by its series δ²/2 − δ³/6 + δ⁴/12 − ….</summary>
    internal static double Excess(double deviation)
    {
        if (Math.Abs(deviation) > SeriesReach)
        {
            return deviation <= -1 ? 1 : ((1 + deviation) * Math.Log(1 + deviation)) - deviation;
        }

        var sum = 0.0;
        for (var k = SeriesTerms; k >= 2; k--)
        {
            sum = ((k % 2 == 0 ? 1.0 : -1.0) / ((double)k * (k - 1))) + (sum * deviation);
        }

        return sum * deviation * deviation;
    }
}
