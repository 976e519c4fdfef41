using System.Runtime.CompilerServices;
using System.Runtime.Intrinsics;

namespace Stochastic.Chains.Kernels;

/// <summary>
/// Moves the rates right of a band and the factors below it between a table and packed squares, Width x Width, measuring them on the way.
/// </summary>
internal static class BandPanels<TKernel>
    where TKernel : struct, ITileKernel
{
    /// <summary>
    /// Packs width rows of a whole number of vectors as squares, padded with zero rows. Writes the sum of each row, gathered lane by lane,
    /// and returns the least nonzero number of all.
    /// </summary>
    internal static double GatherRates(MatrixView source, int width, int vectors, ref double squares, ref double sums)
    {
        nint side = TKernel.Width;
        var smallest = Vector256.Create(double.PositiveInfinity);
        for (var row = 0; row < width && vectors > 0; row++)
        {
            Unsafe.Add(ref sums, row) = GatherRow(ref source[row, 0], vectors, ref Unsafe.Add(ref squares, row * side), ref smallest);
        }

        for (nint row = width; row < side; row++)
        {
            for (nint vector = 0; vector < vectors; vector++)
            {
                ref var target = ref Unsafe.Add(ref squares, ((vector * side) + row) * side);
                Vector256<double>.Zero.StoreUnsafe(ref target);
                Vector256<double>.Zero.StoreUnsafe(ref target, (nuint)(side - 4));
            }
        }

        return NormalRange.Least(smallest);
    }

    /// <summary>Unpacks width rows of squares and returns their least nonzero number.</summary>
    internal static double ScatterRates(ref double squares, MatrixView target, int width, int vectors)
    {
        nint side = TKernel.Width;
        var smallest = Vector256.Create(double.PositiveInfinity);
        for (var row = 0; row < width && vectors > 0; row++)
        {
            ScatterRow(ref Unsafe.Add(ref squares, row * side), vectors, ref target[row, 0], ref smallest);
        }

        return NormalRange.Least(smallest);
    }

    /// <summary>
    /// Packs, row by row, the factors of the rows below a band: (rates·N)·(1/s), given N - I and s. Writes the least nonzero rate and factor
    /// and the largest factor of each column. The reciprocal costs one more rounding than a quotient and saves half of the time.
    /// </summary>
    internal static void SolveFactors(
        MatrixView source, int rows, int width, ref double upper, ref double pivots, ref double factors,
        ref double smallestRates, ref double smallestFactors, ref double largestFactors)
    {
        if (rows == 0)
        {
            return;
        }

        if (width < TKernel.Width)
        {
            GatherColumns(source, rows, width, ref factors);
            Solve(
                ref factors, TKernel.Width, rows, ref upper, ref pivots, ref factors,
                ref smallestRates, ref smallestFactors, ref largestFactors);
        }
        else
        {
            Solve(
                ref source[0, 0], source.Stride, rows, ref upper, ref pivots, ref factors,
                ref smallestRates, ref smallestFactors, ref largestFactors);
        }
    }

    /// <summary>
    /// Unpacks rows of Width numbers into the columns of a band. A whole vector from the first column on lies inside the row of the target; what
    /// is right of the band stays as it is.
    /// </summary>
    internal static void ScatterColumns(ref double columns, MatrixView target, int rows, int width)
    {
        if (rows == 0)
        {
            return;
        }

        ref var place = ref target[0, 0];
        if (TKernel.Width == 8)
        {
            var band = FirstOfEight(width);
            for (; rows > 0; rows--)
            {
                Vector512.ConditionalSelect(band, Vector512.LoadUnsafe(ref columns), Vector512.LoadUnsafe(ref place)).StoreUnsafe(ref place);
                place = ref Unsafe.Add(ref place, target.Stride);
                columns = ref Unsafe.Add(ref columns, 8);
            }
        }
        else
        {
            var band = FirstOfFour(width);
            for (; rows > 0; rows--)
            {
                Vector256.ConditionalSelect(band, Vector256.LoadUnsafe(ref columns), Vector256.LoadUnsafe(ref place)).StoreUnsafe(ref place);
                place = ref Unsafe.Add(ref place, target.Stride);
                columns = ref Unsafe.Add(ref columns, 4);
            }
        }
    }

    /// <summary>
    /// Packs the columns of a band as rows of Width numbers, padded with zeros. A whole vector from the first column on lies inside the row
    /// of the source.
    /// </summary>
    internal static void GatherColumns(MatrixView source, int rows, int width, ref double columns)
    {
        if (rows == 0)
        {
            return;
        }

        ref var place = ref source[0, 0];
        if (TKernel.Width == 8)
        {
            var band = FirstOfEight(width);
            for (; rows > 0; rows--)
            {
                Vector512.ConditionalSelect(band, Vector512.LoadUnsafe(ref place), Vector512<double>.Zero).StoreUnsafe(ref columns);
                place = ref Unsafe.Add(ref place, source.Stride);
                columns = ref Unsafe.Add(ref columns, 8);
            }
        }
        else
        {
            var band = FirstOfFour(width);
            for (; rows > 0; rows--)
            {
                Vector256.ConditionalSelect(band, Vector256.LoadUnsafe(ref place), Vector256<double>.Zero).StoreUnsafe(ref columns);
                place = ref Unsafe.Add(ref place, source.Stride);
                columns = ref Unsafe.Add(ref columns, 4);
            }
        }
    }

    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    private static Vector512<double> FirstOfEight(int width) =>
        Vector512.LessThan(Vector512.Create(0.0, 1, 2, 3, 4, 5, 6, 7), Vector512.Create((double)width));

    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    private static Vector256<double> FirstOfFour(int width) =>
        Vector256.LessThan(Vector256.Create(0.0, 1, 2, 3), Vector256.Create((double)width));

    private static double GatherRow(ref double source, int vectors, ref double target, ref Vector256<double> smallest)
    {
        if (TKernel.Width == 8)
        {
            var sums = Vector512<double>.Zero;
            var least = Vector512.Create(double.PositiveInfinity);
            for (; vectors > 0; vectors--)
            {
                var values = Vector512.LoadUnsafe(ref source);
                values.StoreUnsafe(ref target);
                sums += values;
                least = NormalRange.SmallestNonzero(least, values);
                source = ref Unsafe.Add(ref source, 8);
                target = ref Unsafe.Add(ref target, 64);
            }

            smallest = Vector256.MinNative(smallest, Vector256.MinNative(least.GetLower(), least.GetUpper()));
            return Vector512.Sum(sums);
        }
        else
        {
            var sums = Vector256<double>.Zero;
            var least = smallest;
            for (; vectors > 0; vectors--)
            {
                var values = Vector256.LoadUnsafe(ref source);
                values.StoreUnsafe(ref target);
                sums += values;
                least = NormalRange.SmallestNonzero(least, values);
                source = ref Unsafe.Add(ref source, 4);
                target = ref Unsafe.Add(ref target, 16);
            }

            smallest = least;
            return Vector256.Sum(sums);
        }
    }

    private static void ScatterRow(ref double source, int vectors, ref double target, ref Vector256<double> smallest)
    {
        if (TKernel.Width == 8)
        {
            var least = Vector512.Create(double.PositiveInfinity);
            for (; vectors > 0; vectors--)
            {
                var values = Vector512.LoadUnsafe(ref source);
                values.StoreUnsafe(ref target);
                least = NormalRange.SmallestNonzero(least, values);
                source = ref Unsafe.Add(ref source, 64);
                target = ref Unsafe.Add(ref target, 8);
            }

            smallest = Vector256.MinNative(smallest, Vector256.MinNative(least.GetLower(), least.GetUpper()));
        }
        else
        {
            var least = smallest;
            for (; vectors > 0; vectors--)
            {
                var values = Vector256.LoadUnsafe(ref source);
                values.StoreUnsafe(ref target);
                least = NormalRange.SmallestNonzero(least, values);
                source = ref Unsafe.Add(ref source, 16);
                target = ref Unsafe.Add(ref target, 4);
            }

            smallest = least;
        }
    }

    private static void Solve(
        ref double rates, nint stride, int rows, ref double upper, ref double pivots, ref double factors,
        ref double smallestRates, ref double smallestFactors, ref double largestFactors)
    {
        if (TKernel.Width == 8)
        {
            SolveEight(ref rates, stride, rows, ref upper, ref pivots, ref factors, ref smallestRates, ref smallestFactors, ref largestFactors);
        }
        else
        {
            SolveFour(ref rates, stride, rows, ref upper, ref pivots, ref factors, ref smallestRates, ref smallestFactors, ref largestFactors);
        }
    }

    private static void SolveEight(
        ref double rates, nint stride, int rows, ref double upper, ref double pivots, ref double factors,
        ref double smallestRates, ref double smallestFactors, ref double largestFactors)
    {
        var n0 = Vector512.LoadUnsafe(ref upper);
        var n1 = Vector512.LoadUnsafe(ref upper, 8);
        var n2 = Vector512.LoadUnsafe(ref upper, 16);
        var n3 = Vector512.LoadUnsafe(ref upper, 24);
        var n4 = Vector512.LoadUnsafe(ref upper, 32);
        var n5 = Vector512.LoadUnsafe(ref upper, 40);
        var n6 = Vector512.LoadUnsafe(ref upper, 48);
        var reciprocals = Vector512<double>.One / Vector512.LoadUnsafe(ref pivots);
        var leastRates = Vector512.Create(double.PositiveInfinity);
        var least = leastRates;
        var most = Vector512<double>.Zero;
        for (; rows > 0; rows--)
        {
            var own = Vector512.LoadUnsafe(ref rates);
            leastRates = NormalRange.SmallestNonzero(leastRates, own);
            var left = Vector512.MultiplyAddEstimate(Vector512.Create(rates), n0, own);
            left = Vector512.MultiplyAddEstimate(Vector512.Create(Unsafe.Add(ref rates, 1)), n1, left);
            left = Vector512.MultiplyAddEstimate(Vector512.Create(Unsafe.Add(ref rates, 2)), n2, left);
            left = Vector512.MultiplyAddEstimate(Vector512.Create(Unsafe.Add(ref rates, 3)), n3, left);
            left = Vector512.MultiplyAddEstimate(Vector512.Create(Unsafe.Add(ref rates, 4)), n4, left);
            left = Vector512.MultiplyAddEstimate(Vector512.Create(Unsafe.Add(ref rates, 5)), n5, left);
            left = Vector512.MultiplyAddEstimate(Vector512.Create(Unsafe.Add(ref rates, 6)), n6, left);
            least = NormalRange.SmallestNonzero(least, left);
            most = Vector512.MaxNative(most, left);
            (left * reciprocals).StoreUnsafe(ref factors);
            rates = ref Unsafe.Add(ref rates, stride);
            factors = ref Unsafe.Add(ref factors, 8);
        }

        leastRates.StoreUnsafe(ref smallestRates);
        (least * reciprocals).StoreUnsafe(ref smallestFactors);
        (most * reciprocals).StoreUnsafe(ref largestFactors);
    }

    private static void SolveFour(
        ref double rates, nint stride, int rows, ref double upper, ref double pivots, ref double factors,
        ref double smallestRates, ref double smallestFactors, ref double largestFactors)
    {
        var n0 = Vector256.LoadUnsafe(ref upper);
        var n1 = Vector256.LoadUnsafe(ref upper, 4);
        var n2 = Vector256.LoadUnsafe(ref upper, 8);
        var reciprocals = Vector256<double>.One / Vector256.LoadUnsafe(ref pivots);
        var leastRates = Vector256.Create(double.PositiveInfinity);
        var least = leastRates;
        var most = Vector256<double>.Zero;
        for (; rows > 0; rows--)
        {
            var own = Vector256.LoadUnsafe(ref rates);
            leastRates = NormalRange.SmallestNonzero(leastRates, own);
            var left = Vector256.MultiplyAddEstimate(Vector256.Create(rates), n0, own);
            left = Vector256.MultiplyAddEstimate(Vector256.Create(Unsafe.Add(ref rates, 1)), n1, left);
            left = Vector256.MultiplyAddEstimate(Vector256.Create(Unsafe.Add(ref rates, 2)), n2, left);
            least = NormalRange.SmallestNonzero(least, left);
            most = Vector256.MaxNative(most, left);
            (left * reciprocals).StoreUnsafe(ref factors);
            rates = ref Unsafe.Add(ref rates, stride);
            factors = ref Unsafe.Add(ref factors, 4);
        }

        leastRates.StoreUnsafe(ref smallestRates);
        (least * reciprocals).StoreUnsafe(ref smallestFactors);
        (most * reciprocals).StoreUnsafe(ref largestFactors);
    }
}
