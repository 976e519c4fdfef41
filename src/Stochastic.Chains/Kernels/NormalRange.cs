using System.Runtime.CompilerServices;
using System.Runtime.InteropServices;
using System.Runtime.Intrinsics;

namespace Stochastic.Chains.Kernels;

/// <summary>
/// Guards against results outside the normal range of doubles, where rounding is no longer relative. All numbers here are non-negative, so
/// the smallest nonzero factors on both sides bound every nonzero product of two sets.
/// </summary>
internal static class NormalRange
{
    /// <summary>The smallest normal double, 2^-1022.</summary>
    internal const double Smallest = 2.2250738585072014e-308;

    /// <summary>
    /// Whether every product of a number not below <paramref name="left"/> and one not below <paramref name="right"/> is normal; +∞ stands
    /// for an empty set. A product that only rounding lifts to 2^-1022 carries a relative error of at most 2^-53 all the same.
    /// </summary>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    internal static bool KeepsProduct(double left, double right) => left * right >= Smallest;

    /// <summary>
    /// Whether a matrix product keeps to the normal range, given the least nonzero number of each column of the left and of each row of the
    /// right operand.
    /// </summary>
    internal static bool KeepsProducts(ReadOnlySpan<double> left, ReadOnlySpan<double> right)
    {
        var keeps = true;
        for (var index = 0; index < left.Length; index++)
        {
            keeps &= KeepsProduct(left[index], right[index]);
        }

        return keeps;
    }

    /// <summary>Whether all nonzero numbers of some sets are normal and finite, given the extent of each set.</summary>
    internal static bool Holds(ReadOnlySpan<double> smallest, ReadOnlySpan<double> largest)
    {
        var holds = true;
        for (var index = 0; index < smallest.Length; index++)
        {
            holds &= smallest[index] >= Smallest && double.IsFinite(largest[index]);
        }

        return holds;
    }

    /// <summary>Whether a pivot can be divided by: normal, and its reciprocal too.</summary>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    internal static bool KeepsPivot(double sum) => sum is >= Smallest and <= 1 / Smallest;

    /// <summary>Lane by lane, the smaller of the least nonzero number so far and a further number unless that is zero.</summary>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    internal static Vector256<double> SmallestNonzero(Vector256<double> smallest, Vector256<double> values) => Vector256.MinNative(
        smallest,
        Vector256.ConditionalSelect(
            Vector256.Equals(values, Vector256<double>.Zero), Vector256.Create(double.PositiveInfinity), values));

    /// <summary>As for four lanes, for eight.</summary>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    internal static Vector512<double> SmallestNonzero(Vector512<double> smallest, Vector512<double> values) => Vector512.MinNative(
        smallest,
        Vector512.ConditionalSelect(
            Vector512.Equals(values, Vector512<double>.Zero), Vector512.Create(double.PositiveInfinity), values));

    /// <summary>Lowers each number of target to the one in values, where that is less and not zero.</summary>
    internal static void LowerToNonzero(ReadOnlySpan<double> values, Span<double> target)
    {
        var vectors = MemoryMarshal.Cast<double, Vector256<double>>(values);
        var targets = MemoryMarshal.Cast<double, Vector256<double>>(target)[..vectors.Length];
        for (var index = 0; index < vectors.Length; index++)
        {
            targets[index] = SmallestNonzero(targets[index], vectors[index]);
        }

        for (var index = vectors.Length * Vector256<double>.Count; index < values.Length; index++)
        {
            target[index] = values[index] == 0 ? target[index] : double.MinNative(target[index], values[index]);
        }
    }

    /// <summary>The least of four lanes.</summary>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    internal static double Least(Vector256<double> lanes)
    {
        var pair = Vector128.MinNative(lanes.GetLower(), lanes.GetUpper());
        return double.MinNative(pair[0], pair[1]);
    }

    /// <summary>The greatest of four lanes.</summary>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    internal static double Greatest(Vector256<double> lanes)
    {
        var pair = Vector128.MaxNative(lanes.GetLower(), lanes.GetUpper());
        return double.MaxNative(pair[0], pair[1]);
    }

    /// <summary>The least of some numbers, +∞ of none.</summary>
    internal static double Least(ReadOnlySpan<double> values)
    {
        var vectors = MemoryMarshal.Cast<double, Vector256<double>>(values);
        var lanes = Vector256.Create(double.PositiveInfinity);
        foreach (var vector in vectors)
        {
            lanes = Vector256.MinNative(lanes, vector);
        }

        var least = Least(lanes);
        foreach (var value in values[(vectors.Length * Vector256<double>.Count)..])
        {
            least = double.MinNative(least, value);
        }

        return least;
    }

    /// <summary>The least nonzero number of a non-negative sequence, +∞ when there is none.</summary>
    internal static double SmallestNonzero(ReadOnlySpan<double> values)
    {
        var least = Vector256.Create(double.PositiveInfinity);
        var other = least;
        ref var first = ref MemoryMarshal.GetReference(values);
        nint index = 0;
        for (; index + 8 <= values.Length; index += 8)
        {
            least = SmallestNonzero(least, Vector256.LoadUnsafe(ref Unsafe.Add(ref first, index)));
            other = SmallestNonzero(other, Vector256.LoadUnsafe(ref Unsafe.Add(ref first, index + 4)));
        }

        var smallest = Least(Vector256.MinNative(least, other));
        for (; index < values.Length; index++)
        {
            var value = Unsafe.Add(ref first, index);
            smallest = value == 0 ? smallest : double.MinNative(smallest, value);
        }

        return smallest;
    }

    /// <summary>The least nonzero magnitude (+∞ when there is none) and the largest (0 when there is none) of a sequence.</summary>
    internal static (double Smallest, double Largest) Extent(ReadOnlySpan<double> values)
    {
        var least = Vector256.Create(double.PositiveInfinity);
        var most = Vector256<double>.Zero;
        var vectors = MemoryMarshal.Cast<double, Vector256<double>>(values);
        foreach (var signed in vectors)
        {
            var vector = Vector256.Abs(signed);
            least = SmallestNonzero(least, vector);
            most = Vector256.MaxNative(most, vector);
        }

        var smallest = Least(least);
        var largest = Greatest(most);
        foreach (var signed in values[(vectors.Length * Vector256<double>.Count)..])
        {
            var value = Math.Abs(signed);
            smallest = value == 0 ? smallest : double.MinNative(smallest, value);
            largest = Math.Max(largest, value);
        }

        return (smallest, largest);
    }
}
