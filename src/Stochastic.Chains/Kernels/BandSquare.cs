using System.Runtime.CompilerServices;
using System.Runtime.InteropServices;
using System.Runtime.Intrinsics;

namespace Stochastic.Chains.Kernels;

/// <summary>
/// The square of a band of Width states: eliminated among themselves, with the inverses of its triangles grown in the same sweep. Squares
/// are Width x Width, row by row, so that a row is a whole vector.
/// </summary>
internal static class BandSquare<TKernel>
    where TKernel : struct, ITileKernel
{
    /// <summary>
    /// Eliminates the first <paramref name="width"/> of the states in a square of <paramref name="height"/> rows, padded with zeros; a row
    /// carries the sum of all its rates outside of the square as a rest. Writes the pivots s; <paramref name="triangles"/>: factors L below
    /// and rates U above a zero diagonal; <paramref name="lower"/>: T - I with T = (I - L)^-1; <paramref name="upper"/>: N - I with
    /// N = (I - U/s)^-1; and the least nonzero numbers of T and N. False when a product or quotient could leave the normal range.
    /// </summary>
    /// <remarks>
    /// Row k of T and column k of N are complete at step k, which adds L_ik·T_k to the rows of T below and N_ik·(U_k/s_k) to the rows of N
    /// down to k. Factors are kept apart until the end: a vector cannot be read soon after one of its numbers was written alone.
    /// </remarks>
    internal static bool Eliminate(
        ref double square, int width, int height, ref double rests, ref double pivots, ref double triangles, ref double lower,
        ref double upper, out double smallestPath, out double smallestVisit)
    {
        nint side = TKernel.Width;
        Span<double> factorSquare = stackalloc double[TKernel.Width * TKernel.Width];
        Span<double> jumpRow = stackalloc double[TKernel.Width];
        factorSquare.Clear();
        ref var factors = ref factorSquare[0];
        ref var jumps = ref jumpRow[0];
        var smallestRates = Vector256.Create(double.PositiveInfinity);
        var smallestJumps = Vector256.Create(double.PositiveInfinity);
        var smallestRest = double.PositiveInfinity;
        var smallestFactor = double.PositiveInfinity;
        var keepsPivots = true;
        SetIdentity(ref lower);
        SetIdentity(ref upper);
        for (nint state = 0; state < width; state++)
        {
            ref var rates = ref Unsafe.Add(ref triangles, state * side);
            ref var paths = ref Unsafe.Add(ref lower, state * side);
            var rest = Unsafe.Add(ref rests, state);
            var sum = KeepRightOf(state, ref Unsafe.Add(ref square, state * side), ref rates, out var smallestOfRow) + rest;
            smallestRates = Vector256.MinNative(smallestRates, smallestOfRow);
            Unsafe.Add(ref pivots, state) = sum;
            keepsPivots &= NormalRange.KeepsPivot(sum);
            smallestRest = double.MinNative(smallestRest, rest == 0 ? double.PositiveInfinity : rest);

            var smallestRate = double.PositiveInfinity;
            for (var row = state + 1; row < height; row++)
            {
                ref var target = ref Unsafe.Add(ref square, row * side);
                var rate = Unsafe.Add(ref target, state);
                var factor = rate / sum;
                smallestRate = double.MinNative(smallestRate, rate == 0 ? double.PositiveInfinity : rate);
                Unsafe.Add(ref factors, (row * side) + state) = factor;
                Unsafe.Add(ref rests, row) = double.MultiplyAddEstimate(factor, rest, Unsafe.Add(ref rests, row));
                AddScaled(factor, ref rates, ref target);
                AddScaled(factor, ref paths, ref Unsafe.Add(ref lower, row * side));
            }

            smallestFactor = double.MinNative(smallestFactor, smallestRate / sum);
            smallestJumps = Vector256.MinNative(smallestJumps, Divide(ref rates, sum, ref jumps));
            for (nint row = 0; row <= state; row++)
            {
                ref var target = ref Unsafe.Add(ref upper, row * side);
                AddScaled(Unsafe.Add(ref target, state), ref jumps, ref target);
            }
        }

        for (nint state = width; state < side; state++)
        {
            KeepRightOf(side, ref Unsafe.Add(ref square, state * side), ref Unsafe.Add(ref triangles, state * side), out _);
        }

        // Factors are divided by pivots; rates and rests multiply factors; factors multiply paths, and jumps multiply visits.
        var smallestJump = NormalRange.Least(smallestJumps);
        (smallestPath, var largestPath) = Extent(ref lower);
        smallestVisit = Extent(ref upper).Smallest;
        for (nint state = 0; state < side; state++)
        {
            AddScaled(1, ref Unsafe.Add(ref factors, state * side), ref Unsafe.Add(ref triangles, state * side));
            Unsafe.Add(ref lower, state * (side + 1)) = 0;
            Unsafe.Add(ref upper, state * (side + 1)) = 0;
        }

        return keepsPivots && smallestFactor >= NormalRange.Smallest && smallestJump >= NormalRange.Smallest && double.IsFinite(largestPath)
            && NormalRange.KeepsProduct(smallestFactor, double.MinNative(NormalRange.Least(smallestRates), smallestRest))
            && NormalRange.KeepsProduct(smallestFactor, smallestPath) && NormalRange.KeepsProduct(smallestJump, smallestVisit);
    }

    /// <summary>Writes (I - L)^-1 - I for the strict lower triangle L of a square that is zero elsewhere.</summary>
    internal static void InvertLower(ref double square, ref double inverse)
    {
        nint side = TKernel.Width;
        SetIdentity(ref inverse);
        for (nint state = 0; state < side; state++)
        {
            for (var row = state + 1; row < side; row++)
            {
                AddScaled(
                    Unsafe.Add(ref square, (row * side) + state), ref Unsafe.Add(ref inverse, state * side), ref Unsafe.Add(ref inverse, row * side));
            }
        }

        ClearDiagonal(ref inverse);
    }

    /// <summary>Writes (I - M)^-1 - I for the strict upper triangle M of a square that is zero elsewhere.</summary>
    internal static void InvertUpper(ref double square, ref double inverse)
    {
        nint side = TKernel.Width;
        SetIdentity(ref inverse);
        for (nint state = 0; state < side; state++)
        {
            for (nint row = 0; row <= state; row++)
            {
                ref var target = ref Unsafe.Add(ref inverse, row * side);
                AddScaled(Unsafe.Add(ref target, state), ref Unsafe.Add(ref square, state * side), ref target);
            }
        }

        ClearDiagonal(ref inverse);
    }

    private static (double Smallest, double Largest) Extent(ref double square)
    {
        var smallest = Vector256.Create(double.PositiveInfinity);
        var largest = Vector256<double>.Zero;
        for (nint index = 0; index < TKernel.Width * TKernel.Width; index += Vector256<double>.Count)
        {
            var values = Vector256.LoadUnsafe(ref Unsafe.Add(ref square, index));
            smallest = NormalRange.SmallestNonzero(smallest, values);
            largest = Vector256.MaxNative(largest, values);
        }

        return (NormalRange.Least(smallest), NormalRange.Greatest(largest));
    }

    private static void SetIdentity(ref double square)
    {
        MemoryMarshal.CreateSpan(ref square, TKernel.Width * TKernel.Width).Clear();
        for (nint state = 0; state < TKernel.Width; state++)
        {
            Unsafe.Add(ref square, state * (TKernel.Width + 1)) = 1;
        }
    }

    private static void ClearDiagonal(ref double square)
    {
        for (nint state = 0; state < TKernel.Width; state++)
        {
            Unsafe.Add(ref square, state * (TKernel.Width + 1)) = 0;
        }
    }

    /// <summary>Copies a row with zeros up to the diagonal; returns the sum of the rest and, in four lanes, its least nonzero numbers.</summary>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    private static double KeepRightOf(nint diagonal, ref double row, ref double target, out Vector256<double> smallest)
    {
        var infinite = Vector256.Create(double.PositiveInfinity);
        if (TKernel.Width == 8)
        {
            var right = Vector512.GreaterThan(Vector512.Create(0.0, 1, 2, 3, 4, 5, 6, 7), Vector512.Create((double)diagonal));
            var kept = Vector512.ConditionalSelect(right, Vector512.LoadUnsafe(ref row), Vector512<double>.Zero);
            kept.StoreUnsafe(ref target);
            smallest = NormalRange.SmallestNonzero(NormalRange.SmallestNonzero(infinite, kept.GetLower()), kept.GetUpper());
            return Vector512.Sum(kept);
        }
        else
        {
            var right = Vector256.GreaterThan(Vector256.Create(0.0, 1, 2, 3), Vector256.Create((double)diagonal));
            var kept = Vector256.ConditionalSelect(right, Vector256.LoadUnsafe(ref row), Vector256<double>.Zero);
            kept.StoreUnsafe(ref target);
            smallest = NormalRange.SmallestNonzero(infinite, kept);
            return Vector256.Sum(kept);
        }
    }

    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    private static void AddScaled(double factor, ref double source, ref double target)
    {
        if (TKernel.Width == 8)
        {
            Vector512.MultiplyAddEstimate(Vector512.Create(factor), Vector512.LoadUnsafe(ref source), Vector512.LoadUnsafe(ref target))
                .StoreUnsafe(ref target);
        }
        else
        {
            Vector256.MultiplyAddEstimate(Vector256.Create(factor), Vector256.LoadUnsafe(ref source), Vector256.LoadUnsafe(ref target))
                .StoreUnsafe(ref target);
        }
    }

    /// <summary>Divides a row; returns the least nonzero quotients in four lanes.</summary>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    private static Vector256<double> Divide(ref double row, double divisor, ref double target)
    {
        var infinite = Vector256.Create(double.PositiveInfinity);
        if (TKernel.Width == 8)
        {
            var source = Vector512.LoadUnsafe(ref row);
            var quotient = source / Vector512.Create(divisor);
            quotient.StoreUnsafe(ref target);
            return NormalRange.SmallestNonzero(NormalRange.SmallestNonzero(infinite, source.GetLower()), source.GetUpper()) / divisor;
        }
        else
        {
            var source = Vector256.LoadUnsafe(ref row);
            (source / Vector256.Create(divisor)).StoreUnsafe(ref target);
            return NormalRange.SmallestNonzero(infinite, source) / divisor;
        }
    }
}
