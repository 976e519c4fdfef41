namespace Stochastic.Chains.Kernels;

/// <summary>
/// Products of non-negative matrices, target += left · right, that notice when a product of nonzero numbers could have left the normal
/// range of doubles. Small ones are done row by row, large ones by <see cref="MatrixMultiply"/>.
/// </summary>
/// <param name="widest">The largest inner dimension that will occur.</param>
/// <param name="instructions">The vectors to use.</param>
/// <param name="sharing">Threads and cancellation.</param>
/// <param name="isSafe">Whether it is known beforehand that all products keep to the normal range: nothing is looked at then.</param>
/// <param name="progress">Told now and then how many multiply-adds were made; null when nobody listens.</param>
internal sealed class GuardedProduct(int widest, InstructionSet instructions, WorkSharing sharing, bool isSafe, Action<double>? progress)
{
    private const long SmallestForPanels = 4096;
    private const long WorthReporting = 1 << 22;

    private readonly double[] _leftSmallest = new double[widest];
    private readonly double[] _lastColumn = new double[widest];
    private double _made;
    private double _reported;

    /// <summary>Whether products have to be looked at.</summary>
    internal bool MustLook => !isSafe;

    /// <summary>Whether every product so far kept to the normal range.</summary>
    internal bool KeepsRange { get; private set; } = true;

    /// <summary>The token that the work looks at.</summary>
    internal CancellationToken Cancellation => sharing.Cancellation;

    /// <summary>
    /// The most roundings between the exact and the computed value of an entry of a target: one for the product, one for each addition,
    /// and one more for each pass of <see cref="MatrixMultiply"/>, whether or not multiply-adds are fused.
    /// </summary>
    internal static double Roundings(int inner) => inner == 0 ? 0 : inner + Math.Ceiling(inner / 192.0) + 2;

    /// <summary>Adds left (rows x inner) times right (inner x columns) to target (rows x columns), which must not overlap them.</summary>
    /// <exception cref="OperationCanceledException">Cancellation was requested.</exception>
    internal void Add(MatrixView left, MatrixView right, MatrixView target, int rows, int inner, int columns)
    {
        if (MustLook)
        {
            CheckRange(left, right, rows, inner, columns);
        }

        var work = (long)rows * inner * columns;
        if (work >= SmallestForPanels)
        {
            MatrixMultiply.Add(left, right, target, rows, inner, columns, instructions, sharing);
            Report(work);
            return;
        }

        for (var row = 0; row < rows; row++)
        {
            var sums = target.Row(row, 0, columns);
            for (var index = 0; index < inner; index++)
            {
                if (left[row, index] != 0)
                {
                    VectorLoops.AddScaled(left[row, index], right.Row(index, 0, columns), sums);
                }
            }
        }
    }

    /// <summary>
    /// The same for a right side of rates and of holding times behind them: one column more than a number of whole tiles, perhaps, and
    /// cheaper apart.
    /// </summary>
    /// <exception cref="OperationCanceledException">Cancellation was requested.</exception>
    internal void AddWithLast(MatrixView left, MatrixView right, MatrixView target, int rows, int inner, int columns)
    {
        Add(left, right, target, rows, inner, columns);
        var last = _lastColumn.AsSpan(0, inner);
        for (var index = 0; index < inner; index++)
        {
            last[index] = right[index, columns];
        }

        if (MustLook)
        {
            for (var index = 0; index < inner; index++)
            {
                KeepsRange &= last[index] == 0 || NormalRange.KeepsProduct(_leftSmallest[index], last[index]);
            }
        }

        for (var row = 0; row < rows; row++)
        {
            target[row, columns] += VectorLoops.Dot(left.Row(row, 0, inner), last);
        }
    }

    /// <summary>Notes a product made elsewhere, given the smallest nonzero numbers of its sides.</summary>
    internal void Note(bool keepsRange) => KeepsRange &= keepsRange;

    private void CheckRange(MatrixView left, MatrixView right, int rows, int inner, int columns)
    {
        var smallest = _leftSmallest.AsSpan(0, inner);
        smallest.Fill(double.PositiveInfinity);
        for (var row = 0; row < rows; row++)
        {
            NormalRange.LowerToNonzero(left.Row(row, 0, inner), smallest);
        }

        for (var index = 0; index < inner; index++)
        {
            KeepsRange &= NormalRange.KeepsProduct(smallest[index], NormalRange.SmallestNonzero(right.Row(index, 0, columns)));
        }
    }

    private void Report(long work)
    {
        _made += work;
        if (progress is not null && _made - _reported >= WorthReporting)
        {
            _reported = _made;
            progress(_made);
        }
    }
}
