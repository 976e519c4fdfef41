using System.Runtime.CompilerServices;

namespace Stochastic.Chains.Kernels;

/// <summary>
/// One block of states eliminated among themselves, with the inverses of its two triangles: what turns the rows right of the block into
/// rates at elimination time, and the columns below it into factors.
/// </summary>
internal sealed class BlockTriangles<TKernel>(int widest) : IDisposable
    where TKernel : struct, ITileKernel
{
    private readonly PooledBuffer work = PooledBuffer.Rent(widest * (widest + TKernel.Width));
    private readonly PooledBuffer triangle = PooledBuffer.Rent(widest * widest);
    private readonly PooledBuffer lower = PooledBuffer.Rent(widest * widest);
    private readonly PooledBuffer upper = PooledBuffer.Rent(widest * widest);
    private readonly PooledBuffer upperPanels = PooledBuffer.Rent(ColumnPanels<TKernel>.Size(widest, widest));
    private readonly PooledBuffer pivots = PooledBuffer.Rent(widest);
    private readonly PooledBuffer reciprocals = PooledBuffer.Rent(widest);
    private readonly PooledBuffer extents = PooledBuffer.Rent(2 * widest);

    private int blockWidth;
    private int blockDepth;

    /// <summary>The reciprocals of the pivots of the block, padded with ones.</summary>
    internal Span<double> Reciprocals => reciprocals.Slice(0, blockDepth);

    /// <summary>
    /// Eliminates the block of the given width, padded to a depth, leaving the table as it is. Given are the sums of the rates right of
    /// the block and their least nonzero values, and the least nonzero value of each column below the block. False when
    /// a product here, or in the solves to follow, could leave the normal range.
    /// </summary>
    internal bool Eliminate(
        MatrixView block, int width, int depth, ReadOnlySpan<double> rests, ReadOnlySpan<double> smallestRates, ReadOnlySpan<double> smallestBelow,
        CancellationToken cancellation)
    {
        blockWidth = width;
        blockDepth = depth;
        var stride = depth + TKernel.Width;
        var square = new MatrixView(work.Values, work.Start, stride);
        square.Row(0, 0, depth * stride).Clear();
        for (var row = 0; row < width; row++)
        {
            block.Row(row, 0, width).CopyTo(square.Row(row, 0, width));
            square[row, depth] = rests[row];
        }

        if (!RowReduction<TKernel>.Eliminate(square, width, stride, 0, width, pivots.Slice(0, width), cancellation))
        {
            return false;
        }

        pivots.Slice(width, depth - width).Fill(1);
        for (var state = 0; state < depth; state++)
        {
            reciprocals[state] = 1 / pivots[state];
        }

        return InvertLower(square, smallestRates) && InvertUpper(square, smallestBelow);
    }

    /// <summary>Copies factors and rates inside the block to the table, and the pivots.</summary>
    internal void CopyTo(MatrixView block, Span<double> sums)
    {
        var square = new MatrixView(work.Values, work.Start, blockDepth + TKernel.Width);
        for (var row = 0; row < blockWidth; row++)
        {
            square.Row(row, 0, blockWidth).CopyTo(block.Row(row, 0, blockWidth));
        }

        pivots.Slice(0, blockWidth).CopyTo(sums);
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
                    ref lower[row * depth], ref panel, row + side,
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
                    ref panel, ref upperPanels[(column * depth) + rest - column], rest + side,
                    ref Unsafe.Add(ref panel, rest * side), side);
            }

            for (column -= tile; column >= 0; column -= tile)
            {
                TKernel.AddTile(
                    ref panel, ref upperPanels[column * depth], column + tile,
                    ref Unsafe.Add(ref panel, column * side), side, side * side);
            }
        }
    }

    /// <summary>Gives all working memory back to the pool.</summary>
    public void Dispose()
    {
        work.Dispose();
        triangle.Dispose();
        lower.Dispose();
        upper.Dispose();
        upperPanels.Dispose();
        pivots.Dispose();
        reciprocals.Dispose();
        extents.Dispose();
    }

    private bool InvertLower(MatrixView square, ReadOnlySpan<double> smallestRates)
    {
        var count = blockDepth * blockDepth;
        var rowMajor = new MatrixView(upperPanels.Values, upperPanels.Start, blockDepth);
        for (var row = 0; row < blockDepth; row++)
        {
            var target = rowMajor.Row(row, 0, blockDepth);
            square.Row(row, 0, row).CopyTo(target);
            target[row..].Clear();
        }

        RowPanels<TKernel>.Pack(rowMajor, blockDepth, blockDepth, blockDepth, ref triangle[0]);
        if (!TriangleInverse<TKernel>.OfLower(triangle.Slice(0, count), blockDepth, lower.Slice(0, count)))
        {
            return false;
        }

        var smallest = extents.Slice(0, blockDepth);
        smallest.Fill(double.PositiveInfinity);
        RowPanels<TKernel>.MeasureColumns(ref lower[0], blockDepth, blockDepth, ref smallest[0], ref extents[blockDepth]);
        return NormalRange.KeepsProducts(smallest, smallestRates);
    }

    private bool InvertUpper(MatrixView square, ReadOnlySpan<double> smallestBelow)
    {
        var count = blockDepth * blockDepth;
        var rowMajor = new MatrixView(upperPanels.Values, upperPanels.Start, blockDepth);
        var keeps = true;
        for (var row = 0; row < blockDepth; row++)
        {
            var target = rowMajor.Row(row, 0, blockDepth);
            var jumps = target[(row + 1)..];
            target[..(row + 1)].Clear();
            VectorLoops.Divide(square.Row(row, row + 1, jumps.Length), pivots[row], jumps);
            keeps &= NormalRange.Extent(square.Row(row, row + 1, jumps.Length)).Smallest / pivots[row] >= NormalRange.Smallest;
        }

        RowPanels<TKernel>.Pack(rowMajor, blockDepth, blockDepth, blockDepth, ref triangle[0]);
        if (!keeps || !TriangleInverse<TKernel>.OfUpper(
            triangle.Slice(0, count), blockDepth, upper.Slice(0, count), upperPanels.Slice(0, blockDepth * TKernel.Width)))
        {
            return false;
        }

        rowMajor = new MatrixView(triangle.Values, triangle.Start, blockDepth);
        RowPanels<TKernel>.Unpack(ref upper[0], blockDepth, rowMajor, blockDepth, blockDepth);
        ColumnPanels<TKernel>.Pack(rowMajor, blockDepth, blockDepth, blockDepth, ref upperPanels[0]);
        ColumnPanels<TKernel>.MeasureRows(ref upperPanels[0], blockDepth, blockDepth, ref extents[blockDepth], ref extents[0]);
        return NormalRange.KeepsProducts(smallestBelow, extents.Slice(0, blockDepth));
    }
}
