using System.Runtime.CompilerServices;
using System.Runtime.Intrinsics;

namespace Stochastic.Chains.Kernels;

/// <summary>Inner loops on vectors of two doubles, for machines without wider ones: tiles of 4 x 8.</summary>
internal readonly struct TileKernelPortable : ITileKernel
{
    /// <inheritdoc/>
    public static int Width => 4;

    /// <inheritdoc/>
    public static int TileColumns => 8;

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.NoInlining)]
    public static void AddTile(
        ref double rowPanel, ref double columnPanel, nint columnStride, int depth, ref double target, nint rowStride, nint vectorStride)
    {
        Vector128<double> c00 = default, c01 = default, c02 = default, c03 = default;
        Vector128<double> c10 = default, c11 = default, c12 = default, c13 = default;
        Vector128<double> c20 = default, c21 = default, c22 = default, c23 = default;
        Vector128<double> c30 = default, c31 = default, c32 = default, c33 = default;
        ref var a = ref rowPanel;
        ref var b = ref columnPanel;
        for (; depth > 0; depth -= 4)
        {
            var steps = Math.Min(depth, 4);
            for (nint k = 0; k < steps; k++)
            {
                var b0 = Vector128.LoadUnsafe(ref b);
                var b1 = Vector128.LoadUnsafe(ref b, 2);
                var b2 = Vector128.LoadUnsafe(ref b, 4);
                var b3 = Vector128.LoadUnsafe(ref b, 6);
                var x = Vector128.Create(a);
                c00 = Vector128.MultiplyAddEstimate(x, b0, c00);
                c01 = Vector128.MultiplyAddEstimate(x, b1, c01);
                c02 = Vector128.MultiplyAddEstimate(x, b2, c02);
                c03 = Vector128.MultiplyAddEstimate(x, b3, c03);
                x = Vector128.Create(Unsafe.Add(ref a, 4));
                c10 = Vector128.MultiplyAddEstimate(x, b0, c10);
                c11 = Vector128.MultiplyAddEstimate(x, b1, c11);
                c12 = Vector128.MultiplyAddEstimate(x, b2, c12);
                c13 = Vector128.MultiplyAddEstimate(x, b3, c13);
                x = Vector128.Create(Unsafe.Add(ref a, 8));
                c20 = Vector128.MultiplyAddEstimate(x, b0, c20);
                c21 = Vector128.MultiplyAddEstimate(x, b1, c21);
                c22 = Vector128.MultiplyAddEstimate(x, b2, c22);
                c23 = Vector128.MultiplyAddEstimate(x, b3, c23);
                x = Vector128.Create(Unsafe.Add(ref a, 12));
                c30 = Vector128.MultiplyAddEstimate(x, b0, c30);
                c31 = Vector128.MultiplyAddEstimate(x, b1, c31);
                c32 = Vector128.MultiplyAddEstimate(x, b2, c32);
                c33 = Vector128.MultiplyAddEstimate(x, b3, c33);
                a = ref Unsafe.Add(ref a, 1);
                b = ref Unsafe.Add(ref b, columnStride);
            }

            a = ref Unsafe.Add(ref a, 12);
        }

        ref var right = ref Unsafe.Add(ref target, vectorStride);
        AddPair(ref target, c00, c01);
        AddPair(ref right, c02, c03);
        AddPair(ref Unsafe.Add(ref target, rowStride), c10, c11);
        AddPair(ref Unsafe.Add(ref right, rowStride), c12, c13);
        AddPair(ref Unsafe.Add(ref target, 2 * rowStride), c20, c21);
        AddPair(ref Unsafe.Add(ref right, 2 * rowStride), c22, c23);
        AddPair(ref Unsafe.Add(ref target, 3 * rowStride), c30, c31);
        AddPair(ref Unsafe.Add(ref right, 3 * rowStride), c32, c33);
    }

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.NoInlining)]
    public static void AddNarrowTile(ref double rowPanel, ref double columnPanel, nint columnStride, int depth, ref double target, nint rowStride)
    {
        Vector128<double> c00 = default, c01 = default, c10 = default, c11 = default;
        Vector128<double> c20 = default, c21 = default, c30 = default, c31 = default;
        ref var a = ref rowPanel;
        ref var b = ref columnPanel;
        for (; depth > 0; depth -= 4)
        {
            var steps = Math.Min(depth, 4);
            for (nint k = 0; k < steps; k++)
            {
                var b0 = Vector128.LoadUnsafe(ref b);
                var b1 = Vector128.LoadUnsafe(ref b, 2);
                var x = Vector128.Create(a);
                c00 = Vector128.MultiplyAddEstimate(x, b0, c00);
                c01 = Vector128.MultiplyAddEstimate(x, b1, c01);
                x = Vector128.Create(Unsafe.Add(ref a, 4));
                c10 = Vector128.MultiplyAddEstimate(x, b0, c10);
                c11 = Vector128.MultiplyAddEstimate(x, b1, c11);
                x = Vector128.Create(Unsafe.Add(ref a, 8));
                c20 = Vector128.MultiplyAddEstimate(x, b0, c20);
                c21 = Vector128.MultiplyAddEstimate(x, b1, c21);
                x = Vector128.Create(Unsafe.Add(ref a, 12));
                c30 = Vector128.MultiplyAddEstimate(x, b0, c30);
                c31 = Vector128.MultiplyAddEstimate(x, b1, c31);
                a = ref Unsafe.Add(ref a, 1);
                b = ref Unsafe.Add(ref b, columnStride);
            }

            a = ref Unsafe.Add(ref a, 12);
        }

        AddPair(ref target, c00, c01);
        AddPair(ref Unsafe.Add(ref target, rowStride), c10, c11);
        AddPair(ref Unsafe.Add(ref target, 2 * rowStride), c20, c21);
        AddPair(ref Unsafe.Add(ref target, 3 * rowStride), c30, c31);
    }

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.NoInlining)]
    public static void AddRows(
        ref double target, nint rowStride, nint vectorStride, int rows, int vectors, ref double factors, ref double source)
    {
        for (; rows > 0; rows--)
        {
            AddOneRow(
                ref Unsafe.Add(ref target, (rows - 1) * rowStride), vectorStride, vectors,
                ref Unsafe.Add(ref factors, 4 * (rows - 1)), ref source);
        }
    }

    private static void AddOneRow(ref double target, nint vectorStride, int vectors, ref double factors, ref double source)
    {
        var f0 = Vector128.Create(factors);
        var f1 = Vector128.Create(Unsafe.Add(ref factors, 1));
        var f2 = Vector128.Create(Unsafe.Add(ref factors, 2));
        var f3 = Vector128.Create(Unsafe.Add(ref factors, 3));
        for (; vectors > 0; vectors--)
        {
            var left = Vector128.MultiplyAddEstimate(f0, Vector128.LoadUnsafe(ref source), Vector128.LoadUnsafe(ref target));
            var right = Vector128.MultiplyAddEstimate(f0, Vector128.LoadUnsafe(ref source, 2), Vector128.LoadUnsafe(ref target, 2));
            left = Vector128.MultiplyAddEstimate(f1, Vector128.LoadUnsafe(ref source, 4), left);
            right = Vector128.MultiplyAddEstimate(f1, Vector128.LoadUnsafe(ref source, 6), right);
            left = Vector128.MultiplyAddEstimate(f2, Vector128.LoadUnsafe(ref source, 8), left);
            right = Vector128.MultiplyAddEstimate(f2, Vector128.LoadUnsafe(ref source, 10), right);
            left = Vector128.MultiplyAddEstimate(f3, Vector128.LoadUnsafe(ref source, 12), left);
            right = Vector128.MultiplyAddEstimate(f3, Vector128.LoadUnsafe(ref source, 14), right);
            left.StoreUnsafe(ref target);
            right.StoreUnsafe(ref target, 2);
            target = ref Unsafe.Add(ref target, vectorStride);
            source = ref Unsafe.Add(ref source, 16);
        }
    }

    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    private static void AddPair(ref double target, Vector128<double> left, Vector128<double> right)
    {
        (Vector128.LoadUnsafe(ref target) + left).StoreUnsafe(ref target);
        (Vector128.LoadUnsafe(ref target, 2) + right).StoreUnsafe(ref target, 2);
    }
}
