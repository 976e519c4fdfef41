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

    /// <summary>Adds a multiple, high + low, of the row's off-diagonals to a vector of numbers high + low.</summary>
    void AddScaled(int row, double high, double low, Span<double> targetHigh, Span<double> targetLow);

    /// <summary>The sum of the row's off-diagonals as high + low.</summary>
    (double High, double Low) DoubledRowSum(int row);

    /// <summary>The sum of the row's rates, each times the difference of two numbers: that of the row minus that of the column.</summary>
    DoubledSum Differences(int row, ReadOnlySpan<double> highs, ReadOnlySpan<double> lows);
}

/// <summary>An algorithm that runs on rates without knowing their storage.</summary>
internal interface IRateAlgorithm<TResult>
{
    TResult Run<TRows>(TRows rows)
        where TRows : struct, IRateRows;
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

    public void AddScaled(int row, double high, double low, Span<double> targetHigh, Span<double> targetLow)
    {
        var rates = Rates(row);
        DoubledLoops.AddScaled(high, low, rates[..row], targetHigh, targetLow);
        DoubledLoops.AddScaled(high, low, rates[(row + 1)..], targetHigh[(row + 1)..], targetLow[(row + 1)..]);
    }

    public (double High, double Low) DoubledRowSum(int row)
    {
        var rates = Rates(row);
        var before = DoubledLoops.Sum(rates[..row]);
        var after = DoubledLoops.Sum(rates[(row + 1)..]);
        return DoubleDouble.Add(before.High, before.Low, after.High, after.Low);
    }

    public DoubledSum Differences(int row, ReadOnlySpan<double> highs, ReadOnlySpan<double> lows) =>
        DoubledLoops.Differences(Rates(row), highs[row], lows[row], highs, lows);
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

    public void AddScaled(int row, double high, double low, Span<double> targetHigh, Span<double> targetLow)
    {
        var columns = rows.RowColumns(row);
        var rates = rows.RowValues(row);
        for (var position = 0; position < columns.Length; position++)
        {
            var column = columns[position];
            if (column != row)
            {
                DoubledLoops.AddScaled(high, low, rates[position], ref targetHigh[column], ref targetLow[column]);
            }
        }
    }

    public (double High, double Low) DoubledRowSum(int row)
    {
        var columns = rows.RowColumns(row);
        var rates = rows.RowValues(row);
        var sum = (High: 0.0, Low: 0.0);
        for (var position = 0; position < columns.Length; position++)
        {
            sum = columns[position] == row ? sum : DoubleDouble.Add(sum.High, sum.Low, rates[position], 0);
        }

        return sum;
    }

    public DoubledSum Differences(int row, ReadOnlySpan<double> highs, ReadOnlySpan<double> lows)
    {
        var columns = rows.RowColumns(row);
        var rates = rows.RowValues(row);
        var sum = default(DoubledSum);
        for (var position = 0; position < columns.Length; position++)
        {
            var column = columns[position];
            sum.AddDifference(rates[position], highs[row], lows[row], highs[column], lows[column]);
        }

        return sum;
    }
}
