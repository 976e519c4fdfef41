namespace Stochastic.Chains.Kernels;

/// <summary>
/// Elimination of one state at a time, the definition that the faster forms follow. It forms no product but those of the method itself, so
/// its range check is as sharp as can be: they hand a block over to it when their own intermediate products could leave the normal range.
/// </summary>
internal static class StepReduction
{
    /// <summary>Eliminates the states first..last-1; false when a product could leave the normal range, with the table half done.</summary>
    internal static bool Eliminate(
        MatrixView table, int rows, int columns, int first, int last, Span<double> sums, CancellationToken cancellation)
    {
        for (var state = first; state < last; state++)
        {
            cancellation.ThrowIfCancellationRequested();
            var width = columns - state - 1;
            var rates = table.Row(state, state + 1, width);
            var sum = VectorLoops.Sum(rates);
            sums[state] = sum;
            if (!NormalRange.KeepsPivot(sum))
            {
                return false;
            }

            var smallest = NormalRange.SmallestNonzero(rates);
            for (var row = state + 1; row < rows; row++)
            {
                var rate = table[row, state];
                if (rate == 0)
                {
                    continue;
                }

                var factor = rate / sum;
                if (!(factor >= NormalRange.Smallest && NormalRange.KeepsProduct(factor, smallest) && double.IsFinite(factor)))
                {
                    return false;
                }

                table[row, state] = factor;
                VectorLoops.AddScaled(factor, rates, table.Row(row, state + 1, width));
            }
        }

        return true;
    }
}
