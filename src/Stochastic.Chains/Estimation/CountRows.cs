namespace Stochastic.Chains.Estimation;

/// <summary>Counts in compressed rows: those of row i are at Starts[i] to Starts[i + 1] − 1, columns ascending, all counts positive.</summary>
internal sealed class CountRows
{
    private readonly int[] _starts;
    private readonly int[] _columns;
    private readonly long[] _counts;
    private readonly long[] _totals;

    /// <summary>Takes ownership of the arrays.</summary>
    /// <exception cref="OverflowException">The counts sum to more than 2⁶³ − 1.</exception>
    internal CountRows(int[] starts, int[] columns, long[] counts)
    {
        _starts = starts;
        _columns = columns;
        _counts = counts;
        _totals = new long[starts.Length - 1];
        for (var row = 0; row < _totals.Length; row++)
        {
            foreach (var count in Counts(row))
            {
                _totals[row] = checked(_totals[row] + count);
            }

            Total = checked(Total + _totals[row]);
        }
    }

    internal int RowCount => _totals.Length;

    internal int EntryCount => _columns.Length;

    internal long Total { get; }

    internal long this[int row, int column]
    {
        get
        {
            var found = Columns(row).BinarySearch(column);
            return found >= 0 ? Counts(row)[found] : 0;
        }
    }

    internal long RowTotal(int row) => _totals[row];

    internal ReadOnlySpan<int> Columns(int row) => _columns.AsSpan(_starts[row], _starts[row + 1] - _starts[row]);

    internal ReadOnlySpan<long> Counts(int row) => _counts.AsSpan(_starts[row], _starts[row + 1] - _starts[row]);
}
