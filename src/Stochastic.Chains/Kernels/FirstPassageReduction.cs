namespace Stochastic.Chains.Kernels;

/// <summary>
/// Mean first passage times between all pairs of states by recursive state reduction: only additions, products and quotients of
/// non-negative numbers, nearly all of them in matrix products.
/// </summary>
/// <remarks>
/// The states are split in two, L and R. Eliminating R leaves rates and holding times among L, whose passage times are those of the whole
/// (a chain watched only while it is in L, its absences added to the holding times), and h_R = W·h_L + w; so the times among L are found
/// in the same way, and H_RL = W·H_LL + w·1ᵀ. With the roles exchanged the rest follows. About 10/9 n³ multiply-adds.
/// </remarks>
internal sealed class FirstPassageReduction : IDisposable
{
    private readonly PooledBuffer _memory;
    private readonly GuardedProduct _product;
    private readonly PassageElimination _elimination;
    private bool _keepsRange = true;

    private FirstPassageReduction(int states, int kept, bool isSafe, InstructionSet instructions, WorkSharing sharing, Action<double>? progress)
    {
        _memory = PooledBuffer.Rent(checked((int)SizeFor(states, kept)));
        _product = new GuardedProduct(
            states, instructions, sharing, isSafe, progress is null ? null : made => progress(Math.Min(1, made / WorkOf(states))));
        _elimination = new PassageElimination(_product);
    }

    /// <summary>The numbers of working memory that a table of so many states takes, its input and result not counted.</summary>
    internal static long MemoryOf(int states, int kept) => SizeFor(states, kept);

    /// <summary>
    /// Writes the mean time from each state (row) to each of the first <paramref name="kept"/> states (column), zero to itself. Moves lead
    /// from a kept state to kept ones only, unless all are kept, and the kept states are reached from everywhere.
    /// </summary>
    /// <param name="rates">A row for each state: its rates to all states, then its holding time. The diagonal is never read; not changed.</param>
    /// <param name="states">The number of states.</param>
    /// <param name="kept">The number of states that are targets; the first ones.</param>
    /// <param name="times">Receives the times, states x kept.</param>
    /// <param name="threads">Threads to share the work; the result does not depend on it.</param>
    /// <param name="instructions">The vectors to use.</param>
    /// <param name="progress">Told the part that is done; null when nobody listens.</param>
    /// <param name="cancellation">Looked at between pieces of at most some milliseconds.</param>
    /// <returns>False when a product or quotient of nonzero numbers could have left the normal range of doubles; the times are then void.</returns>
    /// <exception cref="OperationCanceledException">Cancellation was requested.</exception>
    internal static bool Find(
        MatrixView rates, int states, int kept, MatrixView times, int threads, InstructionSet instructions, Action<double>? progress,
        CancellationToken cancellation)
    {
        var isSafe = kept == states && FullRates.KeepProducts(rates, states);
        using var reduction = new FirstPassageReduction(states, kept, isSafe, instructions, new WorkSharing(threads, cancellation), progress);
        if (kept == states)
        {
            reduction.Solve(rates, states, times, 0);
        }
        else
        {
            reduction.SolveAmong(rates, 0, kept, kept, states - kept, times, 0);
        }

        return reduction._keepsRange && reduction._product.KeepsRange && AreFinite(times, states, kept);
    }

    /// <summary>Gives all working memory back to the pool.</summary>
    public void Dispose() => _memory.Dispose();

    /// <summary>About how many multiply-adds a table of so many states takes: 10/9 n³.</summary>
    private static double WorkOf(int states) => 10.0 / 9 * states * states * states;

    private static long SizeFor(int states, int kept) => kept < states ? WorkSize(kept, states - kept) : WorkSize(states);

    private static long WorkSize(int states)
    {
        var first = PassageElimination.Half(states);
        return states <= 1 ? 0 : Math.Max(WorkSize(first, states - first), WorkSize(states - first, first));
    }

    private static long WorkSize(int kept, int dropped) =>
        ((long)dropped * WorkTable.PreferredStride(kept + dropped + 1)) + ((long)kept * WorkTable.PreferredStride(kept + 1)) + WorkSize(kept);

    private void Solve(MatrixView rates, int states, MatrixView times, int free)
    {
        if (states == 1)
        {
            times[0, 0] = 0;
            return;
        }

        var first = PassageElimination.Half(states);
        SolveAmong(rates, 0, first, first, states - first, times, free);
        SolveAmong(rates, first, states - first, 0, first, times, free);
    }

    /// <summary>Fills the columns of the states from <paramref name="keep"/> on, the others being eliminated.</summary>
    private void SolveAmong(MatrixView rates, int keep, int kept, int drop, int dropped, MatrixView times, int free)
    {
        if (!_keepsRange)
        {
            return;
        }

        var states = kept + dropped;
        var before = Take(dropped, states + 1, ref free);
        var among = Take(kept, kept + 1, ref free);
        for (var row = 0; row < dropped; row++)
        {
            rates.Row(drop + row, drop, dropped).CopyTo(before.Row(row, 0, dropped));
            rates.Row(drop + row, keep, kept).CopyTo(before.Row(row, dropped, kept));
            before[row, states] = rates[drop + row, states];
        }

        for (var row = 0; row < kept; row++)
        {
            rates.Row(keep + row, keep, kept).CopyTo(among.Row(row, 0, kept));
            among[row, kept] = rates[keep + row, states];
        }

        if (!_elimination.Eliminate(before, dropped, kept))
        {
            _keepsRange = false;
            return;
        }

        var weights = before.From(0, dropped);
        _product.AddWithLast(rates.From(keep, drop), weights, among, kept, dropped, kept);
        Solve(among, kept, times.From(keep, keep), free);
        for (var row = 0; row < dropped; row++)
        {
            times.Row(drop + row, keep, kept).Fill(weights[row, kept]);
        }

        _product.Add(weights, times.From(keep, keep), times.From(drop, keep), dropped, kept, kept);
    }

    private MatrixView Take(int rows, int columns, ref int free)
    {
        var stride = WorkTable.PreferredStride(columns);
        var view = new MatrixView(_memory.Values, _memory.Start + free, stride);
        free += rows * stride;
        return view;
    }

    private static bool AreFinite(MatrixView times, int states, int kept)
    {
        for (var row = 0; row < states; row++)
        {
            var (smallest, largest) = NormalRange.Extent(times.Row(row, 0, kept));
            if (!(smallest >= NormalRange.Smallest && largest <= double.MaxValue))
            {
                return false;
            }
        }

        return true;
    }
}
