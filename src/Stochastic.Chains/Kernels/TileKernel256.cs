using System.Runtime.CompilerServices;
using System.Runtime.Intrinsics;

namespace Stochastic.Chains.Kernels;

/// <summary>Inner loops on vectors of four doubles: tiles of 4 x 12, which keep 12 sums in the 16 registers.</summary>
internal readonly struct TileKernel256 : ITileKernel
{
    /// <inheritdoc/>
    public static int Width => 4;

    /// <inheritdoc/>
    public static int TileColumns => 12;

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.NoInlining)]
    public static void AddTile(
        ref double rowPanel, ref double columnPanel, nint columnStride, int depth, ref double target, nint rowStride, nint vectorStride)
    {
        Vector256<double> c00 = default, c01 = default, c02 = default, c10 = default, c11 = default, c12 = default;
        Vector256<double> c20 = default, c21 = default, c22 = default, c30 = default, c31 = default, c32 = default;
        ref var a = ref rowPanel;
        ref var b = ref columnPanel;
        for (; depth > 0; depth -= 4)
        {
            var steps = Math.Min(depth, 4);
            for (nint k = 0; k < steps; k++)
            {
                var b0 = Vector256.LoadUnsafe(ref b);
                var b1 = Vector256.LoadUnsafe(ref b, 4);
                var b2 = Vector256.LoadUnsafe(ref b, 8);
                var x = Vector256.Create(a);
                c00 = Vector256.MultiplyAddEstimate(x, b0, c00);
                c01 = Vector256.MultiplyAddEstimate(x, b1, c01);
                c02 = Vector256.MultiplyAddEstimate(x, b2, c02);
                x = Vector256.Create(Unsafe.Add(ref a, 4));
                c10 = Vector256.MultiplyAddEstimate(x, b0, c10);
                c11 = Vector256.MultiplyAddEstimate(x, b1, c11);
                c12 = Vector256.MultiplyAddEstimate(x, b2, c12);
                x = Vector256.Create(Unsafe.Add(ref a, 8));
                c20 = Vector256.MultiplyAddEstimate(x, b0, c20);
                c21 = Vector256.MultiplyAddEstimate(x, b1, c21);
                c22 = Vector256.MultiplyAddEstimate(x, b2, c22);
                x = Vector256.Create(Unsafe.Add(ref a, 12));
                c30 = Vector256.MultiplyAddEstimate(x, b0, c30);
                c31 = Vector256.MultiplyAddEstimate(x, b1, c31);
                c32 = Vector256.MultiplyAddEstimate(x, b2, c32);
                a = ref Unsafe.Add(ref a, 1);
                b = ref Unsafe.Add(ref b, columnStride);
            }

            a = ref Unsafe.Add(ref a, 12);
        }

        AddRow(ref target, vectorStride, c00, c01, c02);
        target = ref Unsafe.Add(ref target, rowStride);
        AddRow(ref target, vectorStride, c10, c11, c12);
        target = ref Unsafe.Add(ref target, rowStride);
        AddRow(ref target, vectorStride, c20, c21, c22);
        target = ref Unsafe.Add(ref target, rowStride);
        AddRow(ref target, vectorStride, c30, c31, c32);
    }

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.NoInlining)]
    public static void AddNarrowTile(ref double rowPanel, ref double columnPanel, nint columnStride, int depth, ref double target, nint rowStride)
    {
        Vector256<double> c0 = default, c1 = default, c2 = default, c3 = default;
        ref var a = ref rowPanel;
        ref var b = ref columnPanel;
        for (; depth > 0; depth -= 4)
        {
            var steps = Math.Min(depth, 4);
            for (nint k = 0; k < steps; k++)
            {
                var x = Vector256.LoadUnsafe(ref b);
                c0 = Vector256.MultiplyAddEstimate(Vector256.Create(a), x, c0);
                c1 = Vector256.MultiplyAddEstimate(Vector256.Create(Unsafe.Add(ref a, 4)), x, c1);
                c2 = Vector256.MultiplyAddEstimate(Vector256.Create(Unsafe.Add(ref a, 8)), x, c2);
                c3 = Vector256.MultiplyAddEstimate(Vector256.Create(Unsafe.Add(ref a, 12)), x, c3);
                a = ref Unsafe.Add(ref a, 1);
                b = ref Unsafe.Add(ref b, columnStride);
            }

            a = ref Unsafe.Add(ref a, 12);
        }

        Add(ref target, c0);
        Add(ref Unsafe.Add(ref target, rowStride), c1);
        Add(ref Unsafe.Add(ref target, 2 * rowStride), c2);
        Add(ref Unsafe.Add(ref target, 3 * rowStride), c3);
    }

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.NoInlining)]
    public static void AddRows(
        ref double target, nint rowStride, nint vectorStride, int rows, int vectors, ref double factors, ref double source)
    {
        for (; rows >= 2; rows -= 2)
        {
            AddTwoRows(
                ref Unsafe.Add(ref target, (rows - 2) * rowStride), rowStride, vectorStride, vectors,
                ref Unsafe.Add(ref factors, 4 * (rows - 2)), ref source);
        }

        if (rows > 0)
        {
            AddOneRow(ref target, vectorStride, vectors, ref factors, ref source);
        }
    }

    private static void AddTwoRows(
        ref double target, nint rowStride, nint vectorStride, int vectors, ref double factors, ref double source)
    {
        var f00 = Vector256.Create(factors);
        var f01 = Vector256.Create(Unsafe.Add(ref factors, 1));
        var f02 = Vector256.Create(Unsafe.Add(ref factors, 2));
        var f03 = Vector256.Create(Unsafe.Add(ref factors, 3));
        var f10 = Vector256.Create(Unsafe.Add(ref factors, 4));
        var f11 = Vector256.Create(Unsafe.Add(ref factors, 5));
        var f12 = Vector256.Create(Unsafe.Add(ref factors, 6));
        var f13 = Vector256.Create(Unsafe.Add(ref factors, 7));
        ref var t0 = ref target;
        ref var t1 = ref Unsafe.Add(ref t0, rowStride);
        ref var s = ref source;
        for (; vectors > 0; vectors--)
        {
            var x = Vector256.LoadUnsafe(ref s);
            var c0 = Vector256.MultiplyAddEstimate(f00, x, Vector256.LoadUnsafe(ref t0));
            var c1 = Vector256.MultiplyAddEstimate(f10, x, Vector256.LoadUnsafe(ref t1));
            x = Vector256.LoadUnsafe(ref s, 4);
            c0 = Vector256.MultiplyAddEstimate(f01, x, c0);
            c1 = Vector256.MultiplyAddEstimate(f11, x, c1);
            x = Vector256.LoadUnsafe(ref s, 8);
            c0 = Vector256.MultiplyAddEstimate(f02, x, c0);
            c1 = Vector256.MultiplyAddEstimate(f12, x, c1);
            x = Vector256.LoadUnsafe(ref s, 12);
            c0 = Vector256.MultiplyAddEstimate(f03, x, c0);
            c1 = Vector256.MultiplyAddEstimate(f13, x, c1);
            c0.StoreUnsafe(ref t0);
            c1.StoreUnsafe(ref t1);
            t0 = ref Unsafe.Add(ref t0, vectorStride);
            t1 = ref Unsafe.Add(ref t1, vectorStride);
            s = ref Unsafe.Add(ref s, 16);
        }
    }

    private static void AddOneRow(ref double target, nint vectorStride, int vectors, ref double factors, ref double source)
    {
        for (; vectors > 0; vectors--)
        {
            var sum = Vector256.LoadUnsafe(ref target);
            for (nint k = 0; k < 4; k++)
            {
                sum = Vector256.MultiplyAddEstimate(
                    Vector256.Create(Unsafe.Add(ref factors, k)), Vector256.LoadUnsafe(ref Unsafe.Add(ref source, 4 * k)), sum);
            }

            sum.StoreUnsafe(ref target);
            target = ref Unsafe.Add(ref target, vectorStride);
            source = ref Unsafe.Add(ref source, 16);
        }
    }

    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    private static void AddRow(
        ref double row, nint vectorStride, Vector256<double> first, Vector256<double> second, Vector256<double> third)
    {
        Add(ref row, first);
        row = ref Unsafe.Add(ref row, vectorStride);
        Add(ref row, second);
        row = ref Unsafe.Add(ref row, vectorStride);
        Add(ref row, third);
    }

    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    private static void Add(ref double target, Vector256<double> addend) => (Vector256.LoadUnsafe(ref target) + addend).StoreUnsafe(ref target);
}
