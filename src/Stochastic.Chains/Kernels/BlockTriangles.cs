using System.Runtime.CompilerServices;

namespace Stochastic.Chains.Kernels;

/// <summary>
/// One block of states eliminated among themselves, with the inverses of its two triangles: what turns the rows right of the block into
/// rates at elimination time, and the columns below it into factors.
/// </summary>
internal sealed class BlockTriangles<TKernel>(int widest) : IDisposable
    where TKernel : struct, ITileKernel
{
    private readonly PooledBuffer _work = PooledBuffer.Rent(widest * (widest + TKernel.Width));
    private readonly PooledBuffer _triangle = PooledBuffer.Rent(widest * widest);
    private readonly PooledBuffer _lower = PooledBuffer.Rent(widest * widest);
    private readonly PooledBuffer _upper = PooledBuffer.Rent(widest * widest);
    private readonly PooledBuffer _upperPanels = PooledBuffer.Rent(ColumnPanels<TKernel>.Size(widest, widest));
    private readonly PooledBuffer _pivots = PooledBuffer.Rent(widest);
    private readonly PooledBuffer _reciprocals = PooledBuffer.Rent(widest);
    private readonly PooledBuffer _extents = PooledBuffer.Rent(2 * widest);

    private int _blockWidth;
    private int _blockDepth;

    /// <summary>The reciprocals of the pivots of the block, padded with ones.</summary>
    internal Span<double> Reciprocals => _reciprocals.Slice(0, _blockDepth);

    /// <summary>
    /// Eliminates the block of the given width, padded to a depth, leaving the table as it is. Given are the sums of the rates right of
    /// the block and their least nonzero values, and the least nonzero value of each column below the block. False when
    /// a product here, or in the solves to follow, could leave the normal range.
    /// </summary>
    internal bool Eliminate(
        MatrixView block, int width, int depth, ReadOnlySpan<double> rests, ReadOnlySpan<double> smallestRates, ReadOnlySpan<double> smallestBelow,
        CancellationToken cancellation)
    {
        _blockWidth = width;
        _blockDepth = depth;
        var stride = depth + TKernel.Width;
        var square = new MatrixView(_work.Values, _work.Start, stride);
        square.Row(0, 0, depth * stride).Clear();
        for (var row = 0; row < width; row++)
        {
            block.Row(row, 0, width).CopyTo(square.Row(row, 0, width));
            square[row, depth] = rests[row];
        }

        if (!RowReduction<TKernel>.Eliminate(square, width, stride, 0, width, _pivots.Slice(0, width), cancellation))
        {
            return false;
        }

        _pivots.Slice(width, depth - width).Fill(1);
        for (var state = 0; state < depth; state++)
        {
            _reciprocals[state] = 1 / _pivots[state];
        }

        return InvertLower(square, smallestRates) && InvertUpper(square, smallestBelow);
    }

    /// <summary>Copies factors and rates inside the block to the table, and the pivots.</summary>
    internal void CopyTo(MatrixView block, Span<double> sums)
    {
        var square = new MatrixView(_work.Values, _work.Start, _blockDepth + TKernel.Width);
        for (var row = 0; row < _blockWidth; row++)
        {
            square.Row(row, 0, _blockWidth).CopyTo(block.Row(row, 0, _blockWidth));
        }

        _pivots.Slice(0, _blockWidth).CopyTo(sums);
    }

    /// <summary>Multiplies column panels by T from the left, in place: each panel from its last rows upwards.</summary>
    internal void SolveRates(ref double panels, int columns, int depth)
    {
        var side = TKernel.Width;
        for (var column = 0; column < columns; column += TKernel.TileColumns)
        {
            ref var panel = ref Unsafe.Add(ref panels, (nint)column * depth);
            for (var row = depth - side; row >= 0; row -= side)
            {
                TKernel.AddTile(
                    ref _lower[row * depth], ref panel, TKernel.TileColumns, row + side,
                    ref Unsafe.Add(ref panel, row * TKernel.TileColumns), TKernel.TileColumns, side);
            }
        }
    }

    /// <summary>Multiplies row panels by N from the right, in place: each panel from its last columns backwards.</summary>
    internal void SolveFactors(ref double panels, int rows, int depth)
    {
        var side = TKernel.Width;
        var tile = TKernel.TileColumns;
        for (var row = 0; row < rows; row += side)
        {
            ref var panel = ref Unsafe.Add(ref panels, (nint)row * depth);
            var column = depth / tile * tile;
            for (var rest = depth - side; rest >= column; rest -= side)
            {
                TKernel.AddNarrowTile(
                    ref panel, ref _upperPanels[(column * depth) + rest - column], tile, rest + side,
                    ref Unsafe.Add(ref panel, rest * side), side);
            }

            for (column -= tile; column >= 0; column -= tile)
            {
                TKernel.AddTile(
                    ref panel, ref _upperPanels[column * depth], tile, column + tile,
                    ref Unsafe.Add(ref panel, column * side), side, side * side);
            }
        }
    }

    /// <summary>Gives all working memory back to the pool.</summary>
    public void Dispose()
    {
        _work.Dispose();
        _triangle.Dispose();
        _lower.Dispose();
        _upper.Dispose();
        _upperPanels.Dispose();
        _pivots.Dispose();
        _reciprocals.Dispose();
        _extents.Dispose();
    }

    private bool InvertLower(MatrixView square, ReadOnlySpan<double> smallestRates)
    {
        var count = _blockDepth * _blockDepth;
        var rowMajor = new MatrixView(_upperPanels.Values, _upperPanels.Start, _blockDepth);
        for (var row = 0; row < _blockDepth; row++)
        {
            var target = rowMajor.Row(row, 0, _blockDepth);
            square.Row(row, 0, row).CopyTo(target);
            target[row..].Clear();
        }

        RowPanels<TKernel>.Pack(rowMajor, _blockDepth, _blockDepth, _blockDepth, ref _triangle[0]);
        if (!TriangleInverse<TKernel>.OfLower(_triangle.Slice(0, count), _blockDepth, _lower.Slice(0, count)))
        {
            return false;
        }

        var smallest = _extents.Slice(0, _blockDepth);
        smallest.Fill(double.PositiveInfinity);
        RowPanels<TKernel>.MeasureColumns(ref _lower[0], _blockDepth, _blockDepth, ref smallest[0], ref _extents[_blockDepth]);
        return NormalRange.KeepsProducts(smallest, smallestRates);
    }

    private bool InvertUpper(MatrixView square, ReadOnlySpan<double> smallestBelow)
    {
        var count = _blockDepth * _blockDepth;
        var rowMajor = new MatrixView(_upperPanels.Values, _upperPanels.Start, _blockDepth);
        var keeps = true;
        for (var row = 0; row < _blockDepth; row++)
        {
            var target = rowMajor.Row(row, 0, _blockDepth);
            var jumps = target[(row + 1)..];
            target[..(row + 1)].Clear();
            VectorLoops.Divide(square.Row(row, row + 1, jumps.Length), _pivots[row], jumps);
            keeps &= NormalRange.Extent(square.Row(row, row + 1, jumps.Length)).Smallest / _pivots[row] >= NormalRange.Smallest;
        }

        RowPanels<TKernel>.Pack(rowMajor, _blockDepth, _blockDepth, _blockDepth, ref _triangle[0]);
        if (!keeps || !TriangleInverse<TKernel>.OfUpper(
            _triangle.Slice(0, count), _blockDepth, _upper.Slice(0, count), _upperPanels.Slice(0, _blockDepth * TKernel.Width)))
        {
            return false;
        }

        rowMajor = new MatrixView(_triangle.Values, _triangle.Start, _blockDepth);
        RowPanels<TKernel>.Unpack(ref _upper[0], _blockDepth, rowMajor, _blockDepth, _blockDepth);
        ColumnPanels<TKernel>.Pack(rowMajor, _blockDepth, _blockDepth, _blockDepth, ref _upperPanels[0]);
        ColumnPanels<TKernel>.MeasureRows(ref _upperPanels[0], _blockDepth, _blockDepth, ref _extents[_blockDepth], ref _extents[0]);
        return NormalRange.KeepsProducts(smallestBelow, _extents.Slice(0, _blockDepth));
    }
}
