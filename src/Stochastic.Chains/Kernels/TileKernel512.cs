using System.Runtime.CompilerServices;
using System.Runtime.Intrinsics;

namespace Stochastic.Chains.Kernels;

/// <summary>Inner loops on vectors of eight doubles: tiles of 8 x 24, which keep 24 sums in the 32 registers.</summary>
internal readonly struct TileKernel512 : ITileKernel
{
    /// <inheritdoc/>
    public static int Width => 8;

    /// <inheritdoc/>
    public static int TileColumns => 24;

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.NoInlining)]
    public static void AddTile(
        ref double rowPanel, ref double columnPanel, nint columnStride, int depth, ref double target, nint rowStride, nint vectorStride)
    {
        Vector512<double> c00 = default, c01 = default, c02 = default, c10 = default, c11 = default, c12 = default;
        Vector512<double> c20 = default, c21 = default, c22 = default, c30 = default, c31 = default, c32 = default;
        Vector512<double> c40 = default, c41 = default, c42 = default, c50 = default, c51 = default, c52 = default;
        Vector512<double> c60 = default, c61 = default, c62 = default, c70 = default, c71 = default, c72 = default;
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
                x = Vector512.Create(Unsafe.Add(ref a, 32));
                c40 = Vector512.MultiplyAddEstimate(x, b0, c40);
                c41 = Vector512.MultiplyAddEstimate(x, b1, c41);
                c42 = Vector512.MultiplyAddEstimate(x, b2, c42);
                x = Vector512.Create(Unsafe.Add(ref a, 40));
                c50 = Vector512.MultiplyAddEstimate(x, b0, c50);
                c51 = Vector512.MultiplyAddEstimate(x, b1, c51);
                c52 = Vector512.MultiplyAddEstimate(x, b2, c52);
                x = Vector512.Create(Unsafe.Add(ref a, 48));
                c60 = Vector512.MultiplyAddEstimate(x, b0, c60);
                c61 = Vector512.MultiplyAddEstimate(x, b1, c61);
                c62 = Vector512.MultiplyAddEstimate(x, b2, c62);
                x = Vector512.Create(Unsafe.Add(ref a, 56));
                c70 = Vector512.MultiplyAddEstimate(x, b0, c70);
                c71 = Vector512.MultiplyAddEstimate(x, b1, c71);
                c72 = Vector512.MultiplyAddEstimate(x, b2, c72);
                a = ref Unsafe.Add(ref a, 1);
                b = ref Unsafe.Add(ref b, columnStride);
            }

            a = ref Unsafe.Add(ref a, 56);
        }

        AddRow(ref target, vectorStride, c00, c01, c02);
        target = ref Unsafe.Add(ref target, rowStride);
        AddRow(ref target, vectorStride, c10, c11, c12);
        target = ref Unsafe.Add(ref target, rowStride);
        AddRow(ref target, vectorStride, c20, c21, c22);
        target = ref Unsafe.Add(ref target, rowStride);
        AddRow(ref target, vectorStride, c30, c31, c32);
        target = ref Unsafe.Add(ref target, rowStride);
        AddRow(ref target, vectorStride, c40, c41, c42);
        target = ref Unsafe.Add(ref target, rowStride);
        AddRow(ref target, vectorStride, c50, c51, c52);
        target = ref Unsafe.Add(ref target, rowStride);
        AddRow(ref target, vectorStride, c60, c61, c62);
        target = ref Unsafe.Add(ref target, rowStride);
        AddRow(ref target, vectorStride, c70, c71, c72);
    }

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.NoInlining)]
    public static void AddNarrowTile(ref double rowPanel, ref double columnPanel, nint columnStride, int depth, ref double target, nint rowStride)
    {
        Vector512<double> c0 = default, c1 = default, c2 = default, c3 = default;
        Vector512<double> c4 = default, c5 = default, c6 = default, c7 = default;
        ref var a = ref rowPanel;
        ref var b = ref columnPanel;
        for (; depth > 0; depth -= 8)
        {
            var steps = Math.Min(depth, 8);
            for (nint k = 0; k < steps; k++)
            {
                var x = Vector512.LoadUnsafe(ref b);
                c0 = Vector512.MultiplyAddEstimate(Vector512.Create(a), x, c0);
                c1 = Vector512.MultiplyAddEstimate(Vector512.Create(Unsafe.Add(ref a, 8)), x, c1);
                c2 = Vector512.MultiplyAddEstimate(Vector512.Create(Unsafe.Add(ref a, 16)), x, c2);
                c3 = Vector512.MultiplyAddEstimate(Vector512.Create(Unsafe.Add(ref a, 24)), x, c3);
                c4 = Vector512.MultiplyAddEstimate(Vector512.Create(Unsafe.Add(ref a, 32)), x, c4);
                c5 = Vector512.MultiplyAddEstimate(Vector512.Create(Unsafe.Add(ref a, 40)), x, c5);
                c6 = Vector512.MultiplyAddEstimate(Vector512.Create(Unsafe.Add(ref a, 48)), x, c6);
                c7 = Vector512.MultiplyAddEstimate(Vector512.Create(Unsafe.Add(ref a, 56)), x, c7);
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

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.NoInlining)]
    public static void AddRows(
        ref double target, nint rowStride, nint vectorStride, int rows, int vectors, ref double factors, ref double source)
    {
        for (; rows >= 3; rows -= 3)
        {
            AddThreeRows(
                ref Unsafe.Add(ref target, (rows - 3) * rowStride), rowStride, vectorStride, vectors,
                ref Unsafe.Add(ref factors, 8 * (rows - 3)), ref source);
        }

        for (; rows > 0; rows--)
        {
            AddOneRow(
                ref Unsafe.Add(ref target, (rows - 1) * rowStride), vectorStride, vectors,
                ref Unsafe.Add(ref factors, 8 * (rows - 1)), ref source);
        }
    }

    private static void AddThreeRows(
        ref double target, nint rowStride, nint vectorStride, int vectors, ref double factors, ref double source)
    {
        var f00 = Vector512.Create(factors);
        var f01 = Vector512.Create(Unsafe.Add(ref factors, 1));
        var f02 = Vector512.Create(Unsafe.Add(ref factors, 2));
        var f03 = Vector512.Create(Unsafe.Add(ref factors, 3));
        var f04 = Vector512.Create(Unsafe.Add(ref factors, 4));
        var f05 = Vector512.Create(Unsafe.Add(ref factors, 5));
        var f06 = Vector512.Create(Unsafe.Add(ref factors, 6));
        var f07 = Vector512.Create(Unsafe.Add(ref factors, 7));
        var f10 = Vector512.Create(Unsafe.Add(ref factors, 8));
        var f11 = Vector512.Create(Unsafe.Add(ref factors, 9));
        var f12 = Vector512.Create(Unsafe.Add(ref factors, 10));
        var f13 = Vector512.Create(Unsafe.Add(ref factors, 11));
        var f14 = Vector512.Create(Unsafe.Add(ref factors, 12));
        var f15 = Vector512.Create(Unsafe.Add(ref factors, 13));
        var f16 = Vector512.Create(Unsafe.Add(ref factors, 14));
        var f17 = Vector512.Create(Unsafe.Add(ref factors, 15));
        var f20 = Vector512.Create(Unsafe.Add(ref factors, 16));
        var f21 = Vector512.Create(Unsafe.Add(ref factors, 17));
        var f22 = Vector512.Create(Unsafe.Add(ref factors, 18));
        var f23 = Vector512.Create(Unsafe.Add(ref factors, 19));
        var f24 = Vector512.Create(Unsafe.Add(ref factors, 20));
        var f25 = Vector512.Create(Unsafe.Add(ref factors, 21));
        var f26 = Vector512.Create(Unsafe.Add(ref factors, 22));
        var f27 = Vector512.Create(Unsafe.Add(ref factors, 23));
        ref var t0 = ref target;
        ref var t1 = ref Unsafe.Add(ref t0, rowStride);
        ref var t2 = ref Unsafe.Add(ref t1, rowStride);
        ref var s = ref source;
        for (; vectors > 0; vectors--)
        {
            var x = Vector512.LoadUnsafe(ref s);
            var c0 = Vector512.MultiplyAddEstimate(f00, x, Vector512.LoadUnsafe(ref t0));
            var c1 = Vector512.MultiplyAddEstimate(f10, x, Vector512.LoadUnsafe(ref t1));
            var c2 = Vector512.MultiplyAddEstimate(f20, x, Vector512.LoadUnsafe(ref t2));
            x = Vector512.LoadUnsafe(ref s, 8);
            c0 = Vector512.MultiplyAddEstimate(f01, x, c0);
            c1 = Vector512.MultiplyAddEstimate(f11, x, c1);
            c2 = Vector512.MultiplyAddEstimate(f21, x, c2);
            x = Vector512.LoadUnsafe(ref s, 16);
            c0 = Vector512.MultiplyAddEstimate(f02, x, c0);
            c1 = Vector512.MultiplyAddEstimate(f12, x, c1);
            c2 = Vector512.MultiplyAddEstimate(f22, x, c2);
            x = Vector512.LoadUnsafe(ref s, 24);
            c0 = Vector512.MultiplyAddEstimate(f03, x, c0);
            c1 = Vector512.MultiplyAddEstimate(f13, x, c1);
            c2 = Vector512.MultiplyAddEstimate(f23, x, c2);
            x = Vector512.LoadUnsafe(ref s, 32);
            c0 = Vector512.MultiplyAddEstimate(f04, x, c0);
            c1 = Vector512.MultiplyAddEstimate(f14, x, c1);
            c2 = Vector512.MultiplyAddEstimate(f24, x, c2);
            x = Vector512.LoadUnsafe(ref s, 40);
            c0 = Vector512.MultiplyAddEstimate(f05, x, c0);
            c1 = Vector512.MultiplyAddEstimate(f15, x, c1);
            c2 = Vector512.MultiplyAddEstimate(f25, x, c2);
            x = Vector512.LoadUnsafe(ref s, 48);
            c0 = Vector512.MultiplyAddEstimate(f06, x, c0);
            c1 = Vector512.MultiplyAddEstimate(f16, x, c1);
            c2 = Vector512.MultiplyAddEstimate(f26, x, c2);
            x = Vector512.LoadUnsafe(ref s, 56);
            c0 = Vector512.MultiplyAddEstimate(f07, x, c0);
            c1 = Vector512.MultiplyAddEstimate(f17, x, c1);
            c2 = Vector512.MultiplyAddEstimate(f27, x, c2);
            c0.StoreUnsafe(ref t0);
            c1.StoreUnsafe(ref t1);
            c2.StoreUnsafe(ref t2);
            t0 = ref Unsafe.Add(ref t0, vectorStride);
            t1 = ref Unsafe.Add(ref t1, vectorStride);
            t2 = ref Unsafe.Add(ref t2, vectorStride);
            s = ref Unsafe.Add(ref s, 64);
        }
    }

    private static void AddOneRow(ref double target, nint vectorStride, int vectors, ref double factors, ref double source)
    {
        var f0 = Vector512.Create(factors);
        var f1 = Vector512.Create(Unsafe.Add(ref factors, 1));
        var f2 = Vector512.Create(Unsafe.Add(ref factors, 2));
        var f3 = Vector512.Create(Unsafe.Add(ref factors, 3));
        var f4 = Vector512.Create(Unsafe.Add(ref factors, 4));
        var f5 = Vector512.Create(Unsafe.Add(ref factors, 5));
        var f6 = Vector512.Create(Unsafe.Add(ref factors, 6));
        var f7 = Vector512.Create(Unsafe.Add(ref factors, 7));
        for (; vectors > 0; vectors--)
        {
            var sum = Vector512.MultiplyAddEstimate(f0, Vector512.LoadUnsafe(ref source), Vector512.LoadUnsafe(ref target));
            sum = Vector512.MultiplyAddEstimate(f1, Vector512.LoadUnsafe(ref source, 8), sum);
            sum = Vector512.MultiplyAddEstimate(f2, Vector512.LoadUnsafe(ref source, 16), sum);
            sum = Vector512.MultiplyAddEstimate(f3, Vector512.LoadUnsafe(ref source, 24), sum);
            sum = Vector512.MultiplyAddEstimate(f4, Vector512.LoadUnsafe(ref source, 32), sum);
            sum = Vector512.MultiplyAddEstimate(f5, Vector512.LoadUnsafe(ref source, 40), sum);
            sum = Vector512.MultiplyAddEstimate(f6, Vector512.LoadUnsafe(ref source, 48), sum);
            sum = Vector512.MultiplyAddEstimate(f7, Vector512.LoadUnsafe(ref source, 56), sum);
            sum.StoreUnsafe(ref target);
            target = ref Unsafe.Add(ref target, vectorStride);
            source = ref Unsafe.Add(ref source, 64);
        }
    }

    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    private static void AddRow(
        ref double row, nint vectorStride, Vector512<double> first, Vector512<double> second, Vector512<double> third)
    {
        Add(ref row, first);
        row = ref Unsafe.Add(ref row, vectorStride);
        Add(ref row, second);
        row = ref Unsafe.Add(ref row, vectorStride);
        Add(ref row, third);
    }

    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    private static void Add(ref double target, Vector512<double> addend) => (Vector512.LoadUnsafe(ref target) + addend).StoreUnsafe(ref target);
}
