using System.Runtime.CompilerServices;
using System.Runtime.Intrinsics;

namespace Stochastic.Chains.Kernels;

/// <summary>
/// Halves of the tiles of <see cref="TileKernel512"/>, for edges of at most four rows or columns, in the same layout and the same order of
/// addition: without them a table of 100 states would cost as much as one of 104.
/// </summary>
internal static class HalfTiles512
{
    /// <summary>The rows of a low tile, the columns of a thin one.</summary>
    internal const int Side = 4;

    /// <summary>As <see cref="ITileKernel.AddTile"/>, for the first four rows of a row panel.</summary>
    [MethodImpl(MethodImplOptions.NoInlining)]
    internal static void AddLowTile(ref double rowPanel, ref double columnPanel, nint columnStride, int depth, ref double target, nint rowStride)
    {
        Vector512<double> c00 = default, c01 = default, c02 = default, c10 = default, c11 = default, c12 = default;
        Vector512<double> c20 = default, c21 = default, c22 = default, c30 = default, c31 = default, c32 = default;
        ref var a = ref rowPanel;
        ref var b = ref columnPanel;
        for (; depth > 0; depth -= 8)
        {
            var steps = Math.Min(depth, 8);
            for (nint k = 0; k < steps; k++)
            {
                var b0 = Vector512.LoadUnsafe(ref b);
                var b1 = Vector512.LoadUnsafe(ref b, 8);
                var b2 = Vector512.LoadUnsafe(ref b, 16);
                var x = Vector512.Create(a);
                c00 = Vector512.MultiplyAddEstimate(x, b0, c00);
                c01 = Vector512.MultiplyAddEstimate(x, b1, c01);
                c02 = Vector512.MultiplyAddEstimate(x, b2, c02);
                x = Vector512.Create(Unsafe.Add(ref a, 8));
                c10 = Vector512.MultiplyAddEstimate(x, b0, c10);
                c11 = Vector512.MultiplyAddEstimate(x, b1, c11);
                c12 = Vector512.MultiplyAddEstimate(x, b2, c12);
                x = Vector512.Create(Unsafe.Add(ref a, 16));
                c20 = Vector512.MultiplyAddEstimate(x, b0, c20);
                c21 = Vector512.MultiplyAddEstimate(x, b1, c21);
                c22 = Vector512.MultiplyAddEstimate(x, b2, c22);
                x = Vector512.Create(Unsafe.Add(ref a, 24));
                c30 = Vector512.MultiplyAddEstimate(x, b0, c30);
                c31 = Vector512.MultiplyAddEstimate(x, b1, c31);
                c32 = Vector512.MultiplyAddEstimate(x, b2, c32);
                a = ref Unsafe.Add(ref a, 1);
                b = ref Unsafe.Add(ref b, columnStride);
            }

            a = ref Unsafe.Add(ref a, 56);
        }

        AddRow(ref target, c00, c01, c02);
        AddRow(ref Unsafe.Add(ref target, rowStride), c10, c11, c12);
        AddRow(ref Unsafe.Add(ref target, 2 * rowStride), c20, c21, c22);
        AddRow(ref Unsafe.Add(ref target, 3 * rowStride), c30, c31, c32);
    }

    /// <summary>As <see cref="ITileKernel.AddNarrowTile"/>, for four columns out of a column panel.</summary>
    [MethodImpl(MethodImplOptions.NoInlining)]
    internal static void AddThinTile(ref double rowPanel, ref double columnPanel, nint columnStride, int depth, ref double target, nint rowStride)
    {
        Vector256<double> c0 = default, c1 = default, c2 = default, c3 = default;
        Vector256<double> c4 = default, c5 = default, c6 = default, c7 = default;
        ref var a = ref rowPanel;
        ref var b = ref columnPanel;
        for (; depth > 0; depth -= 8)
        {
            var steps = Math.Min(depth, 8);
            for (nint k = 0; k < steps; k++)
            {
                var x = Vector256.LoadUnsafe(ref b);
                c0 = Vector256.MultiplyAddEstimate(Vector256.Create(a), x, c0);
                c1 = Vector256.MultiplyAddEstimate(Vector256.Create(Unsafe.Add(ref a, 8)), x, c1);
                c2 = Vector256.MultiplyAddEstimate(Vector256.Create(Unsafe.Add(ref a, 16)), x, c2);
                c3 = Vector256.MultiplyAddEstimate(Vector256.Create(Unsafe.Add(ref a, 24)), x, c3);
                c4 = Vector256.MultiplyAddEstimate(Vector256.Create(Unsafe.Add(ref a, 32)), x, c4);
                c5 = Vector256.MultiplyAddEstimate(Vector256.Create(Unsafe.Add(ref a, 40)), x, c5);
                c6 = Vector256.MultiplyAddEstimate(Vector256.Create(Unsafe.Add(ref a, 48)), x, c6);
                c7 = Vector256.MultiplyAddEstimate(Vector256.Create(Unsafe.Add(ref a, 56)), x, c7);
                a = ref Unsafe.Add(ref a, 1);
                b = ref Unsafe.Add(ref b, columnStride);
            }

            a = ref Unsafe.Add(ref a, 56);
        }

        Add(ref target, c0);
        Add(ref Unsafe.Add(ref target, rowStride), c1);
        Add(ref Unsafe.Add(ref target, 2 * rowStride), c2);
        Add(ref Unsafe.Add(ref target, 3 * rowStride), c3);
        Add(ref Unsafe.Add(ref target, 4 * rowStride), c4);
        Add(ref Unsafe.Add(ref target, 5 * rowStride), c5);
        Add(ref Unsafe.Add(ref target, 6 * rowStride), c6);
        Add(ref Unsafe.Add(ref target, 7 * rowStride), c7);
    }

    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    private static void AddRow(ref double target, Vector512<double> first, Vector512<double> second, Vector512<double> third)
    {
        (Vector512.LoadUnsafe(ref target) + first).StoreUnsafe(ref target);
        (Vector512.LoadUnsafe(ref target, 8) + second).StoreUnsafe(ref target, 8);
        (Vector512.LoadUnsafe(ref target, 16) + third).StoreUnsafe(ref target, 16);
    }

    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    private static void Add(ref double target, Vector256<double> addend) => (Vector256.LoadUnsafe(ref target) + addend).StoreUnsafe(ref target);
}
