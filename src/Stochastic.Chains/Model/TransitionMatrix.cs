using Stochastic.Chains.Kernels;

namespace Stochastic.Chains;

/// <summary>
/// Transition probabilities by position: row = from, column = to. Dense, or compressed sparse rows with ascending 32-bit columns.
/// Immutable after construction; a zero is not a transition.
/// </summary>
internal sealed class TransitionMatrix
{
    private const int AlwaysDenseUpTo = 64;
    private const int PairsPerTransitionWhenDense = 4;

    private readonly double[]? _dense;
    private readonly int[]? _rowStarts;
    private readonly int[]? _columns;
    private readonly double[]? _values;

    private TransitionMatrix(int size, int transitionCount, double[]? dense, int[]? rowStarts, int[]? columns, double[]? values)
    {
        Size = size;
        TransitionCount = transitionCount;
        _dense = dense;
        _rowStarts = rowStarts;
        _columns = columns;
        _values = values;
    }

    internal int Size { get; }

    internal int TransitionCount { get; }

    internal MatrixStorage Storage => _dense is null ? MatrixStorage.CompressedSparseRows : MatrixStorage.Dense;

    internal double this[int row, int column]
    {
        get
        {
            if (_dense is not null)
            {
                return _dense[(row * Size) + column];
            }

            var found = Array.BinarySearch(_columns!, _rowStarts![row], _rowStarts[row + 1] - _rowStarts[row], column);
            return found >= 0 ? _values![found] : 0;
        }
    }

    /// <summary>The density rule, documented on <see cref="MatrixStorage"/>.</summary>
    internal static MatrixStorage ChooseStorage(int size, long transitionCount)
    {
        var pairs = (long)size * size;
        var dense = size <= AlwaysDenseUpTo || (pairs <= Array.MaxLength && transitionCount * PairsPerTransitionWhenDense >= pairs);
        return dense ? MatrixStorage.Dense : MatrixStorage.CompressedSparseRows;
    }

    /// <summary>Takes ownership of a row-major table of Size · Size probabilities.</summary>
    internal static TransitionMatrix FromDense(double[] table, int size, int transitionCount) =>
        new(size, transitionCount, table, null, null, null);

    /// <summary>Takes ownership of compressed rows with ascending columns, whatever their density.</summary>
    internal static TransitionMatrix FromSparse(CompressedRows rows) =>
        new(rows.RowCount, rows.EntryCount, null, rows.Starts, rows.Columns, rows.Values);

    /// <summary>Takes ownership of compressed rows with ascending columns, densifying where the density rule says so.</summary>
    internal static TransitionMatrix FromCompressedRows(CompressedRows rows)
    {
        var size = rows.RowCount;
        if (ChooseStorage(size, rows.EntryCount) == MatrixStorage.CompressedSparseRows)
        {
            return FromSparse(rows);
        }

        var table = new double[size * size];
        for (var row = 0; row < size; row++)
        {
            var target = table.AsSpan(row * size, size);
            var columns = rows.RowColumns(row);
            var values = rows.RowValues(row);
            for (var k = 0; k < columns.Length; k++)
            {
                target[columns[k]] = values[k];
            }
        }

        return FromDense(table, size, rows.EntryCount);
    }

    /// <summary>The row's transitions: columns ascending, each with its positive probability.</summary>
    internal RowEntries Row(int row) => _dense is not null
        ? new RowEntries([], _dense.AsSpan(row * Size, Size))
        : new RowEntries(_columns.AsSpan(_rowStarts![row], _rowStarts[row + 1] - _rowStarts[row]), _values.AsSpan(_rowStarts[row], _rowStarts[row + 1] - _rowStarts[row]));

    /// <summary>Runs an algorithm on the pattern of the transitions, whatever the storage.</summary>
    internal TResult OnGraph<TResult, TAlgorithm>(TAlgorithm algorithm)
        where TAlgorithm : IGraphAlgorithm<TResult> => _dense is not null
        ? algorithm.Run(new DenseGraph(_dense, Size))
        : algorithm.Run(new SparseGraph(_rowStarts!, _columns!));

    /// <summary>Runs an algorithm on the rates, whatever the storage.</summary>
    internal TResult OnRates<TResult, TAlgorithm>(TAlgorithm algorithm)
        where TAlgorithm : IRateAlgorithm<TResult> => _dense is not null
        ? algorithm.Run(new DenseRates(_dense, Size))
        : algorithm.Run(new SparseRates(new CompressedRows(_rowStarts!, _columns!, _values!)));

    /// <summary>The strongly connected components; a dense matrix without zeros is recognized from one row and one column.</summary>
    internal Components FindComponents() => _dense is not null && DenseConnectivity.IsStronglyConnected(_dense, Size)
        ? new Components(new int[Size], 1)
        : OnGraph<Components, StronglyConnectedComponents>(default);

    /// <summary>A whole row, zeros and diagonal included, where the storage is dense.</summary>
    internal bool TryGetDenseRow(int row, out ReadOnlySpan<double> values)
    {
        values = _dense is null ? [] : _dense.AsSpan(row * Size, Size);
        return _dense is not null;
    }

    /// <summary>Adds a multiple of a row, the diagonal included, to a distribution.</summary>
    internal void AddScaledRow(int row, double weight, Span<double> target)
    {
        if (_dense is not null)
        {
            VectorLoops.AddScaled(weight, _dense.AsSpan(row * Size, Size), target);
            return;
        }

        for (var k = _rowStarts![row]; k < _rowStarts[row + 1]; k++)
        {
            ref var entry = ref target[_columns![k]];
            entry = Math.FusedMultiplyAdd(weight, _values![k], entry);
        }
    }
}
