namespace Stochastic.Chains.Kernels;

/// <summary>
/// Implicit double-shift QR sweeps on a Hessenberg matrix, with the orthogonal basis carried along (Francis 1961; Golub and Van Loan,
/// Matrix Computations, 4th ed. 2013, section 7.5; Peters and Wilkinson in Wilkinson and Reinsch 1971). About 20 n · m flops for a
/// window of m rows.
/// </summary>
/// <remarks>
/// The bulge is chased a batch of steps at a time inside a small window on the diagonal. Only then the rest of the rows, of the
/// columns and of the basis is brought up to date, a whole batch in one pass: left and right multiplications commute, so the order
/// does not matter.
/// </remarks>
internal sealed class FrancisSweep(double[] matrix, double[] transposedBasis, int order)
{
    private const int BatchLength = 24;
    private const double UnitRoundoff = 1.1102230246251565e-16;

    private readonly ReflectorChain _chain = new(BatchLength);

    /// <summary>
    /// One sweep over the rows first to last (at least three, none of their subdiagonals zero). The shifts are the eigenvalues of the
    /// given block.
    /// </summary>
    internal void Run(int first, int last, DiagonalBlock shifts)
    {
        Span<double> bulge = stackalloc double[3];
        var top = FindTop(first, last, shifts, bulge);
        for (var batch = top; batch < last; batch += BatchLength)
        {
            var end = Math.Min(batch + BatchLength, last);
            var edge = Math.Min(end + 2, last);
            _chain.Restart(batch);
            for (var step = batch; step < end; step++)
            {
                Chase(step, top, last, batch, edge, bulge);
            }

            _chain.ApplyToRows(matrix, order, edge + 1, order - edge - 1);
            _chain.ApplyToColumns(matrix, order, batch);
            _chain.ApplyToRows(transposedBasis, order, 0, order);
        }
    }

    // Where two subdiagonals in a row are small, the sweep can start below them: the lowest such row, and the first column of the
    // product of the shifted matrices there, divided by its subdiagonal and scaled.
    private int FindTop(int first, int last, DiagonalBlock shifts, Span<double> bulge)
    {
        for (var top = last - 2; ; top--)
        {
            var corner = At(top, top);
            var next = At(top + 1, top + 1);
            var upperGap = shifts.A - corner;
            var lowerGap = shifts.D - corner;
            var below = At(top + 1, top);
            bulge[0] = (upperGap / below * lowerGap) - (shifts.B / below * shifts.C) + At(top, top + 1);
            bulge[1] = next - corner - upperGap - lowerGap;
            bulge[2] = At(top + 2, top + 1);
            var size = Math.Abs(bulge[0]) + Math.Abs(bulge[1]) + Math.Abs(bulge[2]);
            bulge[0] /= size;
            bulge[1] /= size;
            bulge[2] /= size;
            if (top == first)
            {
                return top;
            }

            var neighbors = Math.Abs(At(top - 1, top - 1)) + Math.Abs(corner) + Math.Abs(next);
            var spill = Math.Abs(At(top, top - 1)) * (Math.Abs(bulge[1]) + Math.Abs(bulge[2]));
            if (spill <= UnitRoundoff * Math.Abs(bulge[0]) * neighbors)
            {
                return top;
            }
        }
    }

    // One reflector: formed from the bulge below the subdiagonal, applied inside the window only.
    private void Chase(int step, int top, int last, int batch, int edge, Span<double> bulge)
    {
        var isTriple = step + 2 <= last;
        var vector = isTriple ? bulge : bulge[..2];
        if (step > top)
        {
            for (var row = 0; row < vector.Length; row++)
            {
                vector[row] = At(step + row, step - 1);
            }
        }

        var beta = HouseholderReflector.Form(vector, out var image);
        if (step > top)
        {
            At(step, step - 1) = image;
            for (var row = 1; row < vector.Length; row++)
            {
                At(step + row, step - 1) = 0;
            }
        }
        else if (step > 0)
        {
            // Left of the top the first reflector would touch three entries; the search has made two of them negligible.
            At(step, step - 1) *= 1 - beta;
        }

        if (isTriple)
        {
            _chain.Add(beta, vector[1], vector[2]);
            ReflectTriple(step, Math.Min(step + 3, last), batch, edge, beta, vector[1], vector[2]);
        }
        else
        {
            _chain.AddPair(beta, vector[1]);
            ReflectPair(step, batch, edge, beta, vector[1]);
        }
    }

    private void ReflectTriple(int step, int lowest, int batch, int edge, double beta, double second, double third)
    {
        var width = edge - step + 1;
        var upper = matrix.AsSpan((step * order) + step, width);
        var middle = matrix.AsSpan(((step + 1) * order) + step, width);
        var lower = matrix.AsSpan(((step + 2) * order) + step, width);
        for (var column = 0; column < upper.Length; column++)
        {
            var sum = beta * (upper[column] + (second * middle[column]) + (third * lower[column]));
            upper[column] -= sum;
            middle[column] -= second * sum;
            lower[column] -= third * sum;
        }

        for (var row = batch; row <= lowest; row++)
        {
            var entries = matrix.AsSpan((row * order) + step, 3);
            var sum = beta * (entries[0] + (second * entries[1]) + (third * entries[2]));
            entries[0] -= sum;
            entries[1] -= second * sum;
            entries[2] -= third * sum;
        }
    }

    private void ReflectPair(int step, int batch, int edge, double beta, double second)
    {
        var width = edge - step + 1;
        var upper = matrix.AsSpan((step * order) + step, width);
        var lower = matrix.AsSpan(((step + 1) * order) + step, width);
        for (var column = 0; column < upper.Length; column++)
        {
            var sum = beta * (upper[column] + (second * lower[column]));
            upper[column] -= sum;
            lower[column] -= second * sum;
        }

        for (var row = batch; row <= step + 1; row++)
        {
            var entries = matrix.AsSpan((row * order) + step, 2);
            var sum = beta * (entries[0] + (second * entries[1]));
            entries[0] -= sum;
            entries[1] -= second * sum;
        }
    }

    private ref double At(int row, int column) => ref matrix[(row * order) + column];
}
