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

    private readonly MatrixView table;
    private readonly int rows;
    private readonly int columns;
    private readonly double[] sums;
    private readonly WorkSharing sharing;
    private readonly BlockTriangles<TKernel> triangles = new(WidestBlock);
    private readonly PooledBuffer rates;
    private readonly PooledBuffer factors;
    private readonly PooledBuffer rateExtents;
    private readonly PooledBuffer factorExtents;
    private readonly Action<int> packPiece;
    private readonly Action<int> solvePiece;
    private readonly Action<int> updatePiece;

    private int first;
    private int next;
    private int depth;

    internal BlockReduction(MatrixView table, int rows, int columns, double[] sums, WorkSharing sharing)
    {
        this.table = table;
        this.rows = rows;
        this.columns = columns;
        this.sums = sums;
        this.sharing = sharing;
        rates = PooledBuffer.Rent(checked(ColumnPanels<TKernel>.Size(columns, WidestBlock)));
        factors = PooledBuffer.Rent(checked(RowPanels<TKernel>.Size(rows, WidestBlock)));
        rateExtents = PooledBuffer.Rent(Groups(columns) * WidestBlock * 2);
        factorExtents = PooledBuffer.Rent(Groups(rows) * WidestBlock * 2);
        packPiece = Pack;
        solvePiece = Solve;
        updatePiece = Update;
    }

    private int Right => columns - next;

    private int Below => rows - next;

    /// <summary>Eliminates the states 0..pivots-1; false when a product could leave the normal range, with the table half done.</summary>
    internal bool Eliminate(int pivots)
    {
        for (first = 0; first < pivots && Math.Min(rows, columns) - first >= SmallestTable; first = next)
        {
            next = Math.Min(first + WidthOfNextBlock(), pivots);
            depth = (next - first + TKernel.Width - 1) / TKernel.Width * TKernel.Width;
            var outcome = EliminateBlock();
            if (outcome == BlockOutcome.OutOfRange
                || (outcome == BlockOutcome.Untouched && !RowReduction<TKernel>.Eliminate(table, rows, columns, first, next, sums, sharing.Cancellation)))
            {
                return false;
            }
        }

        return RowReduction<TKernel>.Eliminate(table, rows, columns, first, pivots, sums, sharing.Cancellation);
    }

    /// <summary>Gives all working memory back to the pool.</summary>
    public void Dispose()
    {
        triangles.Dispose();
        rates.Dispose();
        factors.Dispose();
        rateExtents.Dispose();
        factorExtents.Dispose();
    }

    private static int Groups(int extent) => (extent + Group - 1) / Group;

    /// <summary>The columns to the right of a block shall be whole tiles.</summary>
    private int WidthOfNextBlock()
    {
        var remaining = columns - first;
        var widest = remaining > 1000 ? 96 : remaining > 500 ? 72 : 48;
        var excess = (widest - remaining) % TKernel.TileColumns;
        return widest - (excess < 0 ? excess + TKernel.TileColumns : excess);
    }

    private BlockOutcome EliminateBlock()
    {
        var width = next - first;
        var rowGroups = Groups(Below);
        var columnGroups = Groups(Right);

        sharing.Run(columnGroups + rowGroups, packPiece);
        var rests = rateExtents.Slice(0, depth);
        var smallestRates = rateExtents.Slice(depth, depth);
        var smallestFactors = factorExtents.Slice(0, depth);
        var largestFactors = factorExtents.Slice(depth, depth);
        GatherExtents();
        if (!triangles.Eliminate(table.From(first, first), width, depth, rests, smallestRates, smallestFactors, sharing.Cancellation))
        {
            return BlockOutcome.Untouched;
        }

        triangles.CopyTo(table.From(first, first), sums.AsSpan(first, width));
        sharing.Run(columnGroups + rowGroups, solvePiece);
        GatherExtents();
        VectorLoops.Multiply(triangles.Reciprocals, smallestFactors);
        VectorLoops.Multiply(triangles.Reciprocals, largestFactors);
        if (!NormalRange.Holds(smallestFactors, largestFactors) || !NormalRange.KeepsProducts(smallestFactors, smallestRates))
        {
            return BlockOutcome.OutOfRange;
        }

        sharing.Run((Below + UpdateRows - 1) / UpdateRows, updatePiece);
        return BlockOutcome.Eliminated;
    }

    private void Pack(int piece)
    {
        var columnGroups = Groups(Right);
        if (piece < columnGroups)
        {
            var column = piece * Group;
            ColumnPanels<TKernel>.Pack(
                table.From(first, next + column), next - first, Math.Min(Group, Right - column), depth, ref rates[column * depth]);
            MeasureRates(piece);
        }
        else
        {
            var row = (piece - columnGroups) * Group;
            RowPanels<TKernel>.Pack(
                table.From(next + row, first), Math.Min(Group, Below - row), next - first, depth, ref factors[row * depth]);
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
            triangles.SolveRates(ref rates[column * depth], count, depth);
            ColumnPanels<TKernel>.Unpack(ref rates[column * depth], depth, table.From(first, next + column), next - first, count);
            MeasureRates(piece);
        }
        else
        {
            var row = (piece - columnGroups) * Group;
            var count = Math.Min(Group, Below - row);
            triangles.SolveFactors(ref factors[row * depth], count, depth);
            MeasureFactors(piece - columnGroups);
            RowPanels<TKernel>.ScaleColumns(ref factors[row * depth], count, depth, ref triangles.Reciprocals[0]);
            RowPanels<TKernel>.Unpack(ref factors[row * depth], depth, table.From(next + row, first), count, next - first);
        }
    }

    private void Update(int piece)
    {
        var row = piece * UpdateRows;
        PanelProduct<TKernel>.Add(
            ref factors[row * depth], ref rates[0], depth, table.From(next + row, next), Math.Min(UpdateRows, Below - row), Right);
    }

    private void MeasureRates(int group)
    {
        var extents = rateExtents.Slice(group * depth * 2, depth * 2);
        ColumnPanels<TKernel>.MeasureRows(
            ref rates[group * Group * depth], Math.Min(Group, Right - (group * Group)), depth, ref extents[0], ref extents[depth]);
    }

    private void MeasureFactors(int group)
    {
        var extents = factorExtents.Slice(group * depth * 2, depth * 2);
        extents[..depth].Fill(double.PositiveInfinity);
        extents[depth..].Clear();
        RowPanels<TKernel>.MeasureColumns(
            ref factors[group * Group * depth], Math.Min(Group, Below - (group * Group)), depth, ref extents[0], ref extents[depth]);
    }

    /// <summary>Merges the measures of all groups into those of the first, always in the same order.</summary>
    private void GatherExtents()
    {
        var rests = rateExtents.Slice(0, depth);
        var smallestRates = rateExtents.Slice(depth, depth);
        for (var group = 1; group < Groups(Right); group++)
        {
            var extents = rateExtents.Slice(group * depth * 2, depth * 2);
            VectorLoops.AddScaled(1, extents[..depth], rests);
            VectorLoops.LowerTo(extents[depth..], smallestRates);
        }

        var smallestFactors = factorExtents.Slice(0, depth);
        var largestFactors = factorExtents.Slice(depth, depth);
        for (var group = 1; group < Groups(Below); group++)
        {
            var extents = factorExtents.Slice(group * depth * 2, depth * 2);
            VectorLoops.LowerTo(extents[..depth], smallestFactors);
            VectorLoops.RaiseTo(extents[depth..], largestFactors);
        }
    }
}
