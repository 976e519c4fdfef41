namespace Stochastic.Chains.Kernels;

/// <summary>
/// Householder reduction to upper Hessenberg form, A = Q H Qᵀ with zeros below the first subdiagonal of H and Q orthogonal
/// (Golub and Van Loan, Matrix Computations, 4th ed. 2013, section 7.4; Martin and Wilkinson in Wilkinson and Reinsch 1971).
/// Backward stable: H is exact for a matrix within a modest multiple of n u ‖A‖ of A. About 14/3 n³ flops with Q.
/// </summary>
internal static class HessenbergForm
{
    /// <summary>Overwrites matrix (row-major) by H and transposedBasis by Qᵀ.</summary>
    internal static void Reduce(Span<double> matrix, int order, Span<double> transposedBasis, CancellationToken cancellation)
    {
        var reflector = new double[order];
        var sums = new double[order];
        var betas = new double[order];
        for (var column = 0; column < order - 2; column++)
        {
            cancellation.ThrowIfCancellationRequested();
            var first = column + 1;
            var vector = reflector.AsSpan(0, order - first);
            for (var row = first; row < order; row++)
            {
                vector[row - first] = matrix[(row * order) + column];
                matrix[(row * order) + column] = 0;
            }

            betas[column] = HouseholderReflector.Form(vector, out var image);
            matrix[(first * order) + column] = image;
            if (betas[column] != 0)
            {
                Reflect(matrix, order, first, vector, betas[column], sums.AsSpan(0, order - first));
            }

            // A row of the basis that is not in use yet keeps the reflector until it is applied.
            vector.CopyTo(transposedBasis.Slice((first * order) + first, order - first));
        }

        Accumulate(transposedBasis, order, betas, reflector);
    }

    // P A P: from the right row by row, gathering vᵀ A on the way, then from the left.
    private static void Reflect(Span<double> matrix, int order, int first, ReadOnlySpan<double> vector, double beta, Span<double> sums)
    {
        sums.Clear();
        for (var row = 0; row < order; row++)
        {
            var entries = matrix.Slice((row * order) + first, order - first);
            VectorLoops.AddScaled(-beta * VectorLoops.Dot(entries, vector), vector, entries);
            if (row >= first)
            {
                VectorLoops.AddScaled(vector[row - first], entries, sums);
            }
        }

        for (var row = first; row < order; row++)
        {
            VectorLoops.AddScaled(-beta * vector[row - first], sums, matrix.Slice((row * order) + first, order - first));
        }
    }

    // Qᵀ is the product of the reflectors, last one leftmost; built from the last one so that each touches only a trailing square.
    private static void Accumulate(Span<double> transposedBasis, int order, ReadOnlySpan<double> betas, Span<double> reflector)
    {
        for (var column = order - 1; column >= 0; column--)
        {
            var diagonal = (column * order) + column;
            var vector = reflector[..(order - column)];
            transposedBasis.Slice(diagonal, order - column).CopyTo(vector);
            transposedBasis.Slice(column * order, order).Clear();
            transposedBasis[diagonal] = 1;
            for (var row = column + 1; row < order; row++)
            {
                transposedBasis[(row * order) + column] = 0;
            }

            if (column == 0 || betas[column - 1] == 0)
            {
                continue;
            }

            for (var row = column; row < order; row++)
            {
                var entries = transposedBasis.Slice((row * order) + column, order - column);
                VectorLoops.AddScaled(-betas[column - 1] * VectorLoops.Dot(entries, vector), vector, entries);
            }
        }
    }
}
