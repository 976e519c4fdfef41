namespace Stochastic.Chains.Kernels;

/// <summary>The rates of a chain row by row, whatever the storage: row = from, column = to.</summary>
internal interface IRateRows
{
    /// <summary>The number of states.</summary>
    int Count { get; }

    /// <summary>The stored rates of a row; zeros and the diagonal may be among them and are no moves.</summary>
    ReadOnlySpan<double> Rates(int row);

    /// <summary>The column of a stored rate.</summary>
    int Column(int row, int position);

    /// <summary>Adds a multiple of the row's off-diagonals to a vector.</summary>
    void AddScaled(int row, double factor, Span<double> target);

    /// <summary>The sum of the row's off-diagonals, each times the entry of a vector.</summary>
    double Dot(int row, ReadOnlySpan<double> vector);
}

/// <summary>The rows of a row-major square table.</summary>
internal readonly struct DenseRates(double[] table, int size) : IRateRows
{
    public int Count => size;

    public ReadOnlySpan<double> Rates(int row) => table.AsSpan(row * size, size);

    public int Column(int row, int position) => position;

    public void AddScaled(int row, double factor, Span<double> target)
    {
        var rates = Rates(row);
        VectorLoops.AddScaled(factor, rates[..row], target);
        VectorLoops.AddScaled(factor, rates[(row + 1)..], target[(row + 1)..]);
    }

    public double Dot(int row, ReadOnlySpan<double> vector)
    {
        var rates = Rates(row);
        return VectorLoops.Dot(rates[..row], vector[..row]) + VectorLoops.Dot(rates[(row + 1)..], vector[(row + 1)..]);
    }
}

/// <summary>Compressed sparse rows.</summary>
internal readonly struct SparseRates(CompressedRows rows) : IRateRows
{
    public int Count => rows.RowCount;

    public ReadOnlySpan<double> Rates(int row) => rows.RowValues(row);

    public int Column(int row, int position) => rows.Columns[rows.Starts[row] + position];

    public void AddScaled(int row, double factor, Span<double> target)
    {
        var columns = rows.RowColumns(row);
        var rates = rows.RowValues(row);
        for (var position = 0; position < columns.Length; position++)
        {
            if (columns[position] != row)
            {
                target[columns[position]] += factor * rates[position];
            }
        }
    }

    public double Dot(int row, ReadOnlySpan<double> vector)
    {
        var columns = rows.RowColumns(row);
        var rates = rows.RowValues(row);
        var sum = 0.0;
        for (var position = 0; position < columns.Length; position++)
        {
            if (columns[position] != row)
            {
                sum += rates[position] * vector[columns[position]];
            }
        }

        return sum;
    }
}
