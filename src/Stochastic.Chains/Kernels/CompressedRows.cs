namespace Stochastic.Chains.Kernels;

/// <summary>Compressed sparse rows: the entries of row i are those from Starts[i] to Starts[i + 1] − 1.</summary>
internal sealed record CompressedRows(int[] Starts, int[] Columns, double[] Values)
{
    internal int RowCount => Starts.Length - 1;

    internal int EntryCount => Starts[^1];

    internal Span<int> RowColumns(int row) => Columns.AsSpan(Starts[row], Starts[row + 1] - Starts[row]);

    internal Span<double> RowValues(int row) => Values.AsSpan(Starts[row], Starts[row + 1] - Starts[row]);
}
