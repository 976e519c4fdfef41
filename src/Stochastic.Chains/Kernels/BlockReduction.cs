namespace Stochastic.Chains.Kernels;

/// <summary>
/// Elimination of a block of states at a time, for large tables: nearly all work is multiplication of packed non-negative matrices.
/// </summary>
/// <remarks>
/// With A11 the block, A12 right of it, A21 below it and A22 the rest: the block is eliminated with one further column that holds, for each
/// row, the sum of A12. That gives factors L, rates U and pivots s. Then U12 = T·A12, L21 = A21·N/s and A22 += L21·U12, with
/// T = (I - L)^-1 and N = (I - U/s)^-1. Where products inside T and N could leave the normal range, the block is eliminated by
/// <see cref="RowReduction{TKernel}"/> instead.
/// </remarks>
internal sealed class BlockReduction<TKernel> : IDisposable
    where TKernel : struct, ITileKernel
{
    /// <summary>Rows or columns of a piece of shared work, a multiple of every tile; a packed piece fits a second-level cache.</summary>
    private const int Group = 192;

    /// <summary>Rows of a piece of the final update, which streams along whole rows of the table.</summary>
    private const int UpdateRows = 48;

    /// <summary>
    /// Tables with fewer remaining rows or columns are left to <see cref="RowReduction{TKernel}"/>, which is faster while they stay in a
    /// second-level cache (384 x 384 doubles: 1.2 MB).
    /// </summary>
    internal const int SmallestTable = 384;

    /// <summary>Wide blocks save memory traffic, narrow ones work inside the block.</summary>
    internal const int WidestBlock = 96;

    private readonly MatrixView _table;
    private readonly int _rows;
    private readonly int _columns;
    private readonly double[] _sums;
    private readonly WorkSharing _sharing;
    private readonly BlockTriangles<TKernel> _triangles = new(WidestBlock);
    private readonly PooledBuffer _rates;
    private readonly PooledBuffer _factors;
    private readonly PooledBuffer _rateExtents;
    private readonly PooledBuffer _factorExtents;
    private readonly Action<int> _packPiece;
    private readonly Action<int> _solvePiece;
    private readonly Action<int> _updatePiece;

    private int _first;
    private int _next;
    private int _depth;

    internal BlockReduction(MatrixView table, int rows, int columns, double[] sums, WorkSharing sharing)
    {
        _table = table;
        _rows = rows;
        _columns = columns;
        _sums = sums;
        _sharing = sharing;
        _rates = PooledBuffer.Rent(checked(ColumnPanels<TKernel>.Size(columns, WidestBlock)));
        _factors = PooledBuffer.Rent(checked(RowPanels<TKernel>.Size(rows, WidestBlock)));
        _rateExtents = PooledBuffer.Rent(Groups(columns) * WidestBlock * 2);
        _factorExtents = PooledBuffer.Rent(Groups(rows) * WidestBlock * 2);
        _packPiece = Pack;
        _solvePiece = Solve;
        _updatePiece = Update;
    }

    private int Right => _columns - _next;

    private int Below => _rows - _next;

    /// <summary>Eliminates the states 0..pivots-1; false when a product could leave the normal range, with the table half done.</summary>
    internal bool Eliminate(int pivots)
    {
        for (_first = 0; _first < pivots && Math.Min(_rows, _columns) - _first >= SmallestTable; _first = _next)
        {
            _next = Math.Min(_first + WidthOfNextBlock(), pivots);
            _depth = (_next - _first + TKernel.Width - 1) / TKernel.Width * TKernel.Width;
            var outcome = EliminateBlock();
            if (outcome == BlockOutcome.OutOfRange
                || (outcome == BlockOutcome.Untouched && !RowReduction<TKernel>.Eliminate(_table, _rows, _columns, _first, _next, _sums, _sharing.Cancellation)))
            {
                return false;
            }
        }

        return RowReduction<TKernel>.Eliminate(_table, _rows, _columns, _first, pivots, _sums, _sharing.Cancellation);
    }

    /// <summary>Gives all working memory back to the pool.</summary>
    public void Dispose()
    {
        _triangles.Dispose();
        _rates.Dispose();
        _factors.Dispose();
        _rateExtents.Dispose();
        _factorExtents.Dispose();
    }

    private static int Groups(int extent) => (extent + Group - 1) / Group;

    /// <summary>The columns to the right of a block shall be whole tiles.</summary>
    private int WidthOfNextBlock()
    {
        var remaining = _columns - _first;
        var widest = remaining > 1000 ? 96 : remaining > 500 ? 72 : 48;
        var excess = (widest - remaining) % TKernel.TileColumns;
        return widest - (excess < 0 ? excess + TKernel.TileColumns : excess);
    }

    private BlockOutcome EliminateBlock()
    {
        var width = _next - _first;
        var rowGroups = Groups(Below);
        var columnGroups = Groups(Right);

        _sharing.Run(columnGroups + rowGroups, _packPiece);
        var rests = _rateExtents.Slice(0, _depth);
        var smallestRates = _rateExtents.Slice(_depth, _depth);
        var smallestFactors = _factorExtents.Slice(0, _depth);
        var largestFactors = _factorExtents.Slice(_depth, _depth);
        GatherExtents();
        if (!_triangles.Eliminate(_table.From(_first, _first), width, _depth, rests, smallestRates, smallestFactors, _sharing.Cancellation))
        {
            return BlockOutcome.Untouched;
        }

        _triangles.CopyTo(_table.From(_first, _first), _sums.AsSpan(_first, width));
        _sharing.Run(columnGroups + rowGroups, _solvePiece);
        GatherExtents();
        VectorLoops.Multiply(_triangles.Reciprocals, smallestFactors);
        VectorLoops.Multiply(_triangles.Reciprocals, largestFactors);
        if (!NormalRange.Holds(smallestFactors, largestFactors) || !NormalRange.KeepsProducts(smallestFactors, smallestRates))
        {
            return BlockOutcome.OutOfRange;
        }

        _sharing.Run((Below + UpdateRows - 1) / UpdateRows, _updatePiece);
        return BlockOutcome.Eliminated;
    }

    private void Pack(int piece)
    {
        var columnGroups = Groups(Right);
        if (piece < columnGroups)
        {
            var column = piece * Group;
            ColumnPanels<TKernel>.Pack(
                _table.From(_first, _next + column), _next - _first, Math.Min(Group, Right - column), _depth, ref _rates[column * _depth]);
            MeasureRates(piece);
        }
        else
        {
            var row = (piece - columnGroups) * Group;
            RowPanels<TKernel>.Pack(
                _table.From(_next + row, _first), Math.Min(Group, Below - row), _next - _first, _depth, ref _factors[row * _depth]);
            MeasureFactors(piece - columnGroups);
        }
    }

    private void Solve(int piece)
    {
        var columnGroups = Groups(Right);
        if (piece < columnGroups)
        {
            var column = piece * Group;
            var count = Math.Min(Group, Right - column);
            _triangles.SolveRates(ref _rates[column * _depth], count, _depth);
            ColumnPanels<TKernel>.Unpack(ref _rates[column * _depth], _depth, _table.From(_first, _next + column), _next - _first, count);
            MeasureRates(piece);
        }
        else
        {
            var row = (piece - columnGroups) * Group;
            var count = Math.Min(Group, Below - row);
            _triangles.SolveFactors(ref _factors[row * _depth], count, _depth);
            MeasureFactors(piece - columnGroups);
            RowPanels<TKernel>.ScaleColumns(ref _factors[row * _depth], count, _depth, ref _triangles.Reciprocals[0]);
            RowPanels<TKernel>.Unpack(ref _factors[row * _depth], _depth, _table.From(_next + row, _first), count, _next - _first);
        }
    }

    private void Update(int piece)
    {
        var row = piece * UpdateRows;
        PanelProduct<TKernel>.Add(
            ref _factors[row * _depth], ColumnTiles<TKernel>.Packed(ref _rates[0], _depth), _depth, _next - _first,
            _table.From(_next + row, _next), Math.Min(UpdateRows, Below - row), Right);
    }

    private void MeasureRates(int group)
    {
        var extents = _rateExtents.Slice(group * _depth * 2, _depth * 2);
        ColumnPanels<TKernel>.MeasureRows(
            ref _rates[group * Group * _depth], Math.Min(Group, Right - (group * Group)), _depth, ref extents[0], ref extents[_depth]);
    }

    private void MeasureFactors(int group)
    {
        var extents = _factorExtents.Slice(group * _depth * 2, _depth * 2);
        extents[.._depth].Fill(double.PositiveInfinity);
        extents[_depth..].Clear();
        RowPanels<TKernel>.MeasureColumns(
            ref _factors[group * Group * _depth], Math.Min(Group, Below - (group * Group)), _depth, ref extents[0], ref extents[_depth]);
    }

    /// <summary>Merges the measures of all groups into those of the first, always in the same order.</summary>
    private void GatherExtents()
    {
        var rests = _rateExtents.Slice(0, _depth);
        var smallestRates = _rateExtents.Slice(_depth, _depth);
        for (var group = 1; group < Groups(Right); group++)
        {
            var extents = _rateExtents.Slice(group * _depth * 2, _depth * 2);
            VectorLoops.AddScaled(1, extents[.._depth], rests);
            VectorLoops.LowerTo(extents[_depth..], smallestRates);
        }

        var smallestFactors = _factorExtents.Slice(0, _depth);
        var largestFactors = _factorExtents.Slice(_depth, _depth);
        for (var group = 1; group < Groups(Below); group++)
        {
            var extents = _factorExtents.Slice(group * _depth * 2, _depth * 2);
            VectorLoops.LowerTo(extents[.._depth], smallestFactors);
            VectorLoops.RaiseTo(extents[_depth..], largestFactors);
        }
    }
}
