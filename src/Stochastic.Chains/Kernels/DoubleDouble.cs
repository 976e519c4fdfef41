using System.Runtime.CompilerServices;

namespace Stochastic.Chains.Kernels;

/// <summary>
/// Sums, products and quotients of non-negative numbers that are each the unevaluated sum of two doubles, |low| ≤ u · high (Dekker 1971).
/// Errors: see <see cref="ScaledDoubleDouble"/>. They hold while no product of two highs falls below 2⁻⁹⁰⁰.
/// </summary>
internal static class DoubleDouble
{
    /// <summary>The sum, with an error of at most 3.1 u².</summary>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    internal static (double High, double Low) Add(double firstHigh, double firstLow, double secondHigh, double secondLow)
    {
        var sum = firstHigh + secondHigh;
        var part = sum - firstHigh;
        var error = (firstHigh - (sum - part)) + (secondHigh - part);
        return Renormalize(sum, error + (firstLow + secondLow));
    }

    /// <summary>The product, with an error of at most 6.1 u².</summary>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    internal static (double High, double Low) Multiply(double firstHigh, double firstLow, double secondHigh, double secondLow)
    {
        var product = firstHigh * secondHigh;
        var error = Math.FusedMultiplyAdd(firstHigh, secondHigh, -product);
        error = Math.FusedMultiplyAdd(firstLow, secondHigh, error);
        return Renormalize(product, Math.FusedMultiplyAdd(firstHigh, secondLow, error));
    }

    /// <summary>The quotient, with an error of at most 11.1 u².</summary>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    internal static (double High, double Low) Divide(double firstHigh, double firstLow, double secondHigh, double secondLow)
    {
        var quotient = firstHigh / secondHigh;
        var remainder = Math.FusedMultiplyAdd(-quotient, secondHigh, firstHigh) + firstLow;
        remainder = Math.FusedMultiplyAdd(-quotient, secondLow, remainder);
        return Renormalize(quotient, remainder / secondHigh);
    }

    /// <summary>Dekker's fast two-sum: exact because the first number is the larger.</summary>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    private static (double High, double Low) Renormalize(double high, double low)
    {
        var sum = high + low;
        return (sum, low - (sum - high));
    }
}
