namespace Stochastic.Chains.Kernels;

/// <summary>
/// Scales a matrix by a diagonal similarity D⁻¹ A D until rows and columns are of like size, D holding powers of two, so that no
/// entry is rounded unless it falls below the normal range (Parlett and Reinsch 1969).
/// </summary>
/// <remarks>
/// It helps eigenvalues of badly scaled matrices and costs little. It can also harm: where small entries are rounding noise, and for
/// vectors, whose residual in the original scale grows with the spread of D (James, Langou and Lowery 2014, On matrix balancing and
/// eigenvector computation). Hence the choice is the caller's.
/// </remarks>
internal static class Balancing
{
    private const double WorthwhileGain = 0.95;
    private const int MostPasses = 64;
    private const int LargestExponent = 400;

    /// <summary>
    /// Balances a row-major matrix in place and returns the exponents e of D = diag(2^e), between −400 and 400. Each pass is O(n²);
    /// each change lowers the sum of the off-diagonals by a twentieth of its row and column, and there are at most 64 passes.
    /// </summary>
    internal static int[] Apply(Span<double> matrix, int order)
    {
        var exponents = new int[order];
        for (var pass = 0; pass < MostPasses; pass++)
        {
            var isChanged = false;
            for (var index = 0; index < order; index++)
            {
                isChanged |= TryScale(matrix, order, index, ref exponents[index]);
            }

            if (!isChanged)
            {
                break;
            }
        }

        return exponents;
    }

    private static bool TryScale(Span<double> matrix, int order, int index, ref int exponent)
    {
        var (rowSum, columnSum) = (0.0, 0.0);
        for (var other = 0; other < order; other++)
        {
            if (other != index)
            {
                rowSum += Math.Abs(matrix[(index * order) + other]);
                columnSum += Math.Abs(matrix[(other * order) + index]);
            }
        }

        if (rowSum == 0 || columnSum == 0)
        {
            return false;
        }

        var change = (int)Math.Round((Math.Log2(rowSum) - Math.Log2(columnSum)) / 2);
        change = Math.Clamp(exponent + change, -LargestExponent, LargestExponent) - exponent;
        if (change == 0 || Math.ScaleB(columnSum, change) + Math.ScaleB(rowSum, -change) >= WorthwhileGain * (rowSum + columnSum))
        {
            return false;
        }

        exponent += change;
        for (var other = 0; other < order; other++)
        {
            if (other != index)
            {
                ref var inRow = ref matrix[(index * order) + other];
                ref var inColumn = ref matrix[(other * order) + index];
                inRow = Math.ScaleB(inRow, -change);
                inColumn = Math.ScaleB(inColumn, change);
            }
        }

        return true;
    }
}
