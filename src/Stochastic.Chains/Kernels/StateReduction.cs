namespace Stochastic.Chains.Kernels;

/// <summary>
/// State reduction (Grassmann, Taksar and Heyman 1985; Sheskin 1985): elimination of the first states of a table of non-negative rates,
/// whose pivots are sums of the remaining rates of a row. Only additions, products and quotients of non-negative numbers occur.
/// </summary>
internal static class StateReduction
{
    /// <summary>Tables with fewer columns gain nothing from bands.</summary>
    private const int SmallestTable = 12;

    /// <summary>
    /// Eliminates the states 0..pivots-1 of a row-major table in ascending order. For each state k: the pivot s_k is the sum of the entries
    /// right of the diagonal, the factor of each row i below is L_ik = a_ik / s_k, kept in place of a_ik, and L_ik·a_kj is added to each
    /// a_ij with j right of k. On return the table holds factors below and rates at elimination time above its diagonal. The diagonal is
    /// never used; it is overwritten.
    /// </summary>
    /// <param name="table">Rates: row = from, column = to; not less than pivots rows and columns. Columns beyond the pivots are exits, targets
    /// or kept states, rows beyond them kept states.</param>
    /// <param name="rows">Number of rows.</param>
    /// <param name="columns">Number of columns.</param>
    /// <param name="pivots">Number of states to eliminate.</param>
    /// <param name="sums">Receives the pivots.</param>
    /// <param name="threads">Threads to share the work; the result does not depend on it.</param>
    /// <param name="instructions">The vectors to use.</param>
    /// <param name="cancellation">Looked at between pieces of at most some milliseconds.</param>
    /// <returns>False when a product or quotient of nonzero numbers could have left the normal range of doubles, or a pivot is zero; the
    /// table is then half done and the caller has to start again in extended range.</returns>
    /// <exception cref="OperationCanceledException">Cancellation was requested.</exception>
    internal static bool Eliminate(
        MatrixView table, int rows, int columns, int pivots, double[] sums, int threads, InstructionSet instructions,
        CancellationToken cancellation)
    {
        var sharing = new WorkSharing(threads, cancellation);
        var kept = instructions switch
        {
            _ when columns < SmallestTable => StepReduction.Eliminate(table, rows, columns, 0, pivots, sums, cancellation),
            _ => InstructionSets.Resolve(instructions) switch
            {
                InstructionSet.Vector512 => Eliminate<TileKernel512>(table, rows, columns, pivots, sums, sharing),
                InstructionSet.Vector256 => Eliminate<TileKernel256>(table, rows, columns, pivots, sums, sharing),
                _ => Eliminate<TileKernelPortable>(table, rows, columns, pivots, sums, sharing),
            },
        };
        return kept && KeptEntriesAreFinite(table, rows, columns, pivots);
    }

    private static bool Eliminate<TKernel>(MatrixView table, int rows, int columns, int pivots, double[] sums, WorkSharing sharing)
        where TKernel : struct, ITileKernel
    {
        if (columns < BlockReduction<TKernel>.SmallestTable)
        {
            return RowReduction<TKernel>.Eliminate(table, rows, columns, 0, pivots, sums, sharing.Cancellation);
        }

        using var reduction = new BlockReduction<TKernel>(table, rows, columns, sums, sharing);
        return reduction.Eliminate(pivots);
    }

    /// <summary>What overflowed anywhere else shows in a pivot or a factor.</summary>
    private static bool KeptEntriesAreFinite(MatrixView table, int rows, int columns, int pivots)
    {
        for (var row = pivots; row < rows; row++)
        {
            for (var column = pivots; column < columns; column++)
            {
                if (column != row && !double.IsFinite(table[row, column]))
                {
                    return false;
                }
            }
        }

        return true;
    }
}
