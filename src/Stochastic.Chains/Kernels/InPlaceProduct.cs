using System.Runtime.CompilerServices;
using System.Runtime.InteropServices;
using System.Runtime.Intrinsics;

namespace Stochastic.Chains.Kernels;

/// <summary>
/// A small square matrix times a matrix of few rows, in place: each column is read once and written once. At most
/// <see cref="MostRows"/> rows.
/// </summary>
internal static class InPlaceProduct
{
    /// <summary>The most rows of the product.</summary>
    internal const int MostRows = 16;

    private const int RowsAtOnce = 4;
    private const int ColumnsAtOnce = 8;

    /// <summary>
    /// Replaces the rows x columns matrix by square · matrix. Entries are sums over the rows in ascending order; at most one rounding for each
    /// row and one more lie between a term and the result.
    /// </summary>
    /// <param name="square">The left operand, one row after another at the given distance.</param>
    /// <param name="stride">The distance between rows of the square.</param>
    /// <param name="matrix">The right operand and the result.</param>
    /// <param name="rows">The number of rows, at most <see cref="MostRows"/>.</param>
    /// <param name="columns">The number of columns.</param>
    internal static void Multiply(ReadOnlySpan<double> square, int stride, MatrixView matrix, int rows, int columns)
    {
        // Rows of zeros fill the last group of four: their products are computed and dropped.
        var filled = (rows + RowsAtOnce - 1) / RowsAtOnce * RowsAtOnce;
        Span<double> left = stackalloc double[filled * MostRows];
        left.Clear();
        for (var row = 0; row < rows; row++)
        {
            square.Slice(row * stride, rows).CopyTo(left[(row * MostRows)..]);
        }

        Span<double> result = stackalloc double[filled * ColumnsAtOnce];
        var column = 0;
        for (; column + ColumnsAtOnce <= columns; column += ColumnsAtOnce)
        {
            for (var row = 0; row < rows; row += RowsAtOnce)
            {
                MultiplyRows(ref left[row * MostRows], ref matrix[0, column], matrix.Stride, rows, ref result[row * ColumnsAtOnce]);
            }

            for (var row = 0; row < rows; row++)
            {
                ref var target = ref matrix[row, column];
                Vector256.LoadUnsafe(ref result[row * ColumnsAtOnce]).StoreUnsafe(ref target);
                Vector256.LoadUnsafe(ref result[(row * ColumnsAtOnce) + 4]).StoreUnsafe(ref target, 4);
            }
        }

        if (column < columns)
        {
            MultiplyEdge(left, matrix.From(0, column), rows, columns - column, result);
        }
    }

    private static void MultiplyEdge(ReadOnlySpan<double> left, MatrixView matrix, int rows, int columns, Span<double> result)
    {
        Span<double> right = stackalloc double[rows * ColumnsAtOnce];
        right.Clear();
        for (var row = 0; row < rows; row++)
        {
            matrix.Row(row, 0, columns).CopyTo(right[(row * ColumnsAtOnce)..]);
        }

        for (var row = 0; row < rows; row += RowsAtOnce)
        {
            MultiplyRows(
                ref MemoryMarshal.GetReference(left[(row * MostRows)..]), ref right[0], ColumnsAtOnce, rows, ref result[row * ColumnsAtOnce]);
        }

        for (var row = 0; row < rows; row++)
        {
            result.Slice(row * ColumnsAtOnce, columns).CopyTo(matrix.Row(row, 0, columns));
        }
    }

    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    private static void MultiplyRows(ref double left, ref double right, nint stride, int inner, ref double result)
    {
        Vector256<double> a0 = default, a1 = default, b0 = default, b1 = default, c0 = default, c1 = default, d0 = default, d1 = default;
        for (nint index = 0; index < inner; index++)
        {
            var first = Vector256.LoadUnsafe(ref right);
            var second = Vector256.LoadUnsafe(ref right, 4);
            right = ref Unsafe.Add(ref right, stride);
            var factor = Vector256.Create(Unsafe.Add(ref left, index));
            a0 = Vector256.MultiplyAddEstimate(factor, first, a0);
            a1 = Vector256.MultiplyAddEstimate(factor, second, a1);
            factor = Vector256.Create(Unsafe.Add(ref left, index + MostRows));
            b0 = Vector256.MultiplyAddEstimate(factor, first, b0);
            b1 = Vector256.MultiplyAddEstimate(factor, second, b1);
            factor = Vector256.Create(Unsafe.Add(ref left, index + (2 * MostRows)));
            c0 = Vector256.MultiplyAddEstimate(factor, first, c0);
            c1 = Vector256.MultiplyAddEstimate(factor, second, c1);
            factor = Vector256.Create(Unsafe.Add(ref left, index + (3 * MostRows)));
            d0 = Vector256.MultiplyAddEstimate(factor, first, d0);
            d1 = Vector256.MultiplyAddEstimate(factor, second, d1);
        }

        a0.StoreUnsafe(ref result);
        a1.StoreUnsafe(ref Unsafe.Add(ref result, 4));
        b0.StoreUnsafe(ref Unsafe.Add(ref result, ColumnsAtOnce));
        b1.StoreUnsafe(ref Unsafe.Add(ref result, ColumnsAtOnce + 4));
        c0.StoreUnsafe(ref Unsafe.Add(ref result, 2 * ColumnsAtOnce));
        c1.StoreUnsafe(ref Unsafe.Add(ref result, (2 * ColumnsAtOnce) + 4));
        d0.StoreUnsafe(ref Unsafe.Add(ref result, 3 * ColumnsAtOnce));
        d1.StoreUnsafe(ref Unsafe.Add(ref result, (3 * ColumnsAtOnce) + 4));
    }
}
