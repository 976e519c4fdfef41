using System.Runtime.CompilerServices;
using System.Runtime.Intrinsics;

namespace Stochastic.Chains.Kernels;

/// <summary>The diagonal of a product of two square matrices, without the rest of it.</summary>
internal static class ProductDiagonal
{
    private const int Lanes = 4;
    private const int Tile = 64;

    /// <summary>
    /// Adds the entries (k, k) of left · right to the sums: products in ascending order of the inner index, each with at most two roundings.
    /// </summary>
    internal static void Add(MatrixView left, MatrixView right, Span<double> sums)
    {
        var size = sums.Length;
        var whole = size / Lanes * Lanes;
        for (var first = 0; first < whole; first += Tile)
        {
            var last = Math.Min(first + Tile, whole);
            for (var start = 0; start < whole; start += Tile)
            {
                for (var state = first; state < last; state += Lanes)
                {
                    AddFour(ref left[state, start], left.Stride, ref right[start, state], right.Stride, Math.Min(Tile, whole - start), ref sums[state]);
                }
            }
        }

        for (var state = 0; state < size; state++)
        {
            for (var other = state < whole ? whole : 0; other < size; other++)
            {
                sums[state] = double.MultiplyAddEstimate(left[state, other], right[other, state], sums[state]);
            }
        }
    }

    /// <summary>Columns of four rows of the left matrix against rows of four columns of the right one.</summary>
    private static void AddFour(ref double left, nint leftStride, ref double right, nint rightStride, int inner, ref double sums)
    {
        var sum = Vector256.LoadUnsafe(ref sums);
        for (; inner > 0; inner--)
        {
            var column = Vector256.Create(
                left, Unsafe.Add(ref left, leftStride), Unsafe.Add(ref left, 2 * leftStride), Unsafe.Add(ref left, 3 * leftStride));
            sum = Vector256.MultiplyAddEstimate(column, Vector256.LoadUnsafe(ref right), sum);
            left = ref Unsafe.Add(ref left, 1);
            right = ref Unsafe.Add(ref right, rightStride);
        }

        sum.StoreUnsafe(ref sums);
    }
}
