namespace Stochastic.Chains.Kernels;

/// <summary>
/// Elimination of a band of Width states at a time, for tables that live in the caches: the factors and rates of a band are kept packed,
/// and each remaining row is then read and written once per band.
/// </summary>
/// <remarks>
/// With T = (I - L)^-1 and N = (I - U/s)^-1 from the square of the band, both non-negative, the rates at elimination time are T·A12 and
/// the factors A21·N/s. A band whose products could leave the normal range is left to <see cref="StepReduction"/>, which forms fewer.
/// </remarks>
internal static class RowReduction<TKernel>
    where TKernel : struct, ITileKernel
{
    /// <summary>Eliminates the states first..last-1; false when a product could leave the normal range, with the table half done.</summary>
    internal static bool Eliminate(
        MatrixView table, int rows, int columns, int first, int last, Span<double> sums, CancellationToken cancellation)
    {
        if (first == last)
        {
            return true;
        }

        var side = TKernel.Width;
        using var rates = PooledBuffer.Rent(side * (columns - first));
        using var factors = PooledBuffer.Rent(side * (rows - first));
        while (first < last)
        {
            cancellation.ThrowIfCancellationRequested();

            // The columns right of a band are a whole number of vectors, and begin on a cache line in a table laid out for it.
            var partial = (columns - first) % side;
            var next = first + (partial == 0 ? side : partial);
            if (next > last || columns - first < side)
            {
                return (Math.Max(rows, columns) - first <= side && EliminateRest(table, rows, columns, first, last, sums))
                    || StepReduction.Eliminate(table, rows, columns, first, last, sums, cancellation);
            }

            var outcome = EliminateBand(table, rows, columns, first, next, sums, ref rates[0], ref factors[0]);
            if (outcome == BlockOutcome.OutOfRange
                || (outcome == BlockOutcome.Untouched && !StepReduction.Eliminate(table, rows, columns, first, next, sums, cancellation)))
            {
                return false;
            }

            first = next;
        }

        return true;
    }

    private static BlockOutcome EliminateBand(
        MatrixView table, int rows, int columns, int first, int next, Span<double> sums, ref double rates, ref double factors)
    {
        var side = TKernel.Width;
        var width = next - first;
        var vectors = (columns - next) / side;
        var below = rows - next;
        Span<double> square = stackalloc double[side * side];
        Span<double> triangles = stackalloc double[side * side];
        Span<double> lower = stackalloc double[side * side];
        Span<double> upper = stackalloc double[side * side];
        Span<double> pivots = stackalloc double[side];
        Span<double> rests = stackalloc double[side];
        Span<double> smallestBelow = stackalloc double[side];
        Span<double> smallestFactors = stackalloc double[side];
        Span<double> largestFactors = stackalloc double[side];

        pivots.Fill(1);
        rests.Clear();
        square[(width * side)..].Clear();
        BandPanels<TKernel>.GatherColumns(table.From(first, first), width, width, ref square[0]);
        smallestBelow.Fill(double.PositiveInfinity);
        smallestFactors.Fill(double.PositiveInfinity);
        largestFactors.Clear();
        var smallestRate = BandPanels<TKernel>.GatherRates(table.From(first, next), width, vectors, ref rates, ref rests[0]);
        if (!BandSquare<TKernel>.Eliminate(
            ref square[0], width, width, ref rests[0], ref pivots[0], ref triangles[0], ref lower[0], ref upper[0],
            out var smallestPath, out var smallestVisit)
            || !NormalRange.KeepsProduct(smallestPath, smallestRate))
        {
            return BlockOutcome.Untouched;
        }

        BandPanels<TKernel>.SolveFactors(
            table.From(next, first), below, width, ref upper[0], ref pivots[0], ref factors,
            ref smallestBelow[0], ref smallestFactors[0], ref largestFactors[0]);
        if (!NormalRange.KeepsProduct(NormalRange.Least(smallestBelow), smallestVisit))
        {
            return BlockOutcome.Untouched;
        }

        TKernel.AddRows(ref rates, side, side * side, side, vectors, ref lower[0], ref rates);
        pivots[..width].CopyTo(sums[first..]);
        BandPanels<TKernel>.ScatterColumns(ref triangles[0], table.From(first, first), width, width);
        smallestRate = BandPanels<TKernel>.ScatterRates(ref rates, table.From(first, next), width, vectors);
        BandPanels<TKernel>.ScatterColumns(ref factors, table.From(next, first), below, width);
        if (!NormalRange.Holds(smallestFactors, largestFactors)
            || (!NormalRange.KeepsProduct(NormalRange.Least(smallestFactors), smallestRate)
                && !KeepsProducts(table.From(first, next), width, columns - next, smallestFactors)))
        {
            return BlockOutcome.OutOfRange;
        }

        if (vectors > 0 && below > 0)
        {
            TKernel.AddRows(ref table[next, next], table.Stride, side, below, vectors, ref factors, ref rates);
        }

        return BlockOutcome.Eliminated;
    }

    /// <summary>Whether the products of factors and rates keep to the normal range, state by state.</summary>
    private static bool KeepsProducts(MatrixView rates, int width, int columns, ReadOnlySpan<double> smallestFactors)
    {
        var keeps = true;
        for (var state = 0; state < width; state++)
        {
            keeps &= NormalRange.KeepsProduct(smallestFactors[state], NormalRange.SmallestNonzero(rates.Row(state, 0, columns)));
        }

        return keeps;
    }

    /// <summary>
    /// Eliminates the last states of a table that has shrunk to a square. False when that could leave the normal range; the table is then
    /// untouched.
    /// </summary>
    private static bool EliminateRest(MatrixView table, int rows, int columns, int first, int last, Span<double> sums)
    {
        var side = TKernel.Width;
        var width = last - first;
        Span<double> square = stackalloc double[side * side];
        Span<double> triangles = stackalloc double[side * side];
        Span<double> lower = stackalloc double[side * side];
        Span<double> upper = stackalloc double[side * side];
        Span<double> pivots = stackalloc double[side];
        Span<double> rests = stackalloc double[side];
        square.Clear();
        rests.Clear();
        for (var row = first; row < rows; row++)
        {
            table.Row(row, first, columns - first).CopyTo(square[((row - first) * side)..]);
        }

        if (!BandSquare<TKernel>.Eliminate(
            ref square[0], width, rows - first, ref rests[0], ref pivots[0], ref triangles[0], ref lower[0], ref upper[0], out _, out _))
        {
            return false;
        }

        pivots[..width].CopyTo(sums[first..]);
        for (var row = first; row < rows; row++)
        {
            var source = row < last ? triangles : square;
            triangles.Slice((row - first) * side, width).CopyTo(table.Row(row, first, width));
            source.Slice(((row - first) * side) + width, columns - last).CopyTo(table.Row(row, last, columns - last));
        }

        return true;
    }
}
