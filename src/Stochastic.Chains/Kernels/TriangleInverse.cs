namespace Stochastic.Chains.Kernels;

/// <summary>
/// Inverses of the two triangles of an eliminated block, as sums over paths: non-negative, nothing subtracted. Matrices are depth x depth,
/// one row panel after another in the layout of <see cref="RowPanels{TKernel}"/>.
/// </summary>
internal static class TriangleInverse<TKernel>
    where TKernel : struct, ITileKernel
{
    /// <summary>
    /// Writes (I - L)^-1 - I for a strictly lower triangular L. False when a product could leave the normal range or the result overflows.
    /// </summary>
    internal static bool OfLower(Span<double> lower, int depth, Span<double> inverse)
    {
        var side = TKernel.Width;
        var square = side * side;
        var squares = depth / side;
        lower.CopyTo(inverse);
        for (var panel = 0; panel < squares; panel++)
        {
            var row = panel * squares * square;
            for (var before = 0; before < panel; before++)
            {
                TKernel.AddRows(
                    ref inverse[row], side, square, side, before + 1, ref lower[row + (before * square)], ref inverse[before * squares * square]);
            }

            var inner = inverse.Slice(row + (panel * square), square);
            BandSquare<TKernel>.InvertLower(ref lower[row + (panel * square)], ref inner[0]);
            var outer = inverse.Slice(row, panel * square);
            if (!NormalRange.KeepsProduct(NormalRange.Extent(inner).Smallest, NormalRange.Extent(outer).Smallest))
            {
                return false;
            }

            TKernel.AddRows(ref inverse[row], side, square, side, panel, ref inner[0], ref inverse[row]);
        }

        var (smallest, largest) = NormalRange.Extent(inverse);
        return NormalRange.KeepsProduct(NormalRange.Extent(lower).Smallest, smallest) && double.IsFinite(largest);
    }

    /// <summary>
    /// Writes (I - M)^-1 - I for a strictly upper triangular M. False when a product could leave the normal range. The scratch holds one
    /// row panel.
    /// </summary>
    internal static bool OfUpper(Span<double> upper, int depth, Span<double> inverse, Span<double> scratch)
    {
        var side = TKernel.Width;
        var square = side * side;
        var squares = depth / side;
        upper.CopyTo(inverse);
        for (var panel = squares - 1; panel >= 0; panel--)
        {
            var row = panel * squares * square;
            for (var after = squares - 1; after > panel; after--)
            {
                TKernel.AddRows(
                    ref inverse[row + (after * square)], side, square, side, squares - after,
                    ref upper[row + (after * square)], ref inverse[((after * squares) + after) * square]);
            }

            var inner = inverse.Slice(row + (panel * square), square);
            BandSquare<TKernel>.InvertUpper(ref upper[row + (panel * square)], ref inner[0]);
            var outer = inverse.Slice(row + ((panel + 1) * square), (squares - panel - 1) * square);
            if (!NormalRange.KeepsProduct(NormalRange.Extent(inner).Smallest, NormalRange.Extent(outer).Smallest))
            {
                return false;
            }

            if (outer.Length > 0)
            {
                outer.CopyTo(scratch);
                TKernel.AddRows(ref outer[0], side, square, side, squares - panel - 1, ref inner[0], ref scratch[0]);
            }
        }

        return NormalRange.KeepsProduct(NormalRange.Extent(upper).Smallest, NormalRange.Extent(inverse).Smallest);
    }
}
