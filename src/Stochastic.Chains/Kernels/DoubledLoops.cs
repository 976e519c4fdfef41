using System.Runtime.CompilerServices;
using System.Runtime.InteropServices;
using System.Runtime.Intrinsics;

namespace Stochastic.Chains.Kernels;

/// <summary>Loops that keep twice the digits of a double, in lanes of four. Bounds with u = 2⁻⁵³, as long as products stay above 2⁻⁹⁰⁰.</summary>
internal static class DoubledLoops
{
    private const double UnitRoundoff = 1.1102230246251565e-16;
    private const double SecondOrder = 1.01;
    private static readonly int Lanes = Vector256<double>.Count;

    /// <summary>
    /// Adds (high + low) · source to target, all non-negative; one addition loses at most 3 u² of the target and 7 u² of the product, and
    /// n additions at most <see cref="SumError"/> of the result.
    /// </summary>
    internal static void AddScaled(double high, double low, ReadOnlySpan<double> source, Span<double> targetHigh, Span<double> targetLow)
    {
        var (factorHigh, factorLow) = (Vector256.Create(high), Vector256.Create(low));
        var sources = MemoryMarshal.Cast<double, Vector256<double>>(source);
        var highs = MemoryMarshal.Cast<double, Vector256<double>>(targetHigh)[..sources.Length];
        var lows = MemoryMarshal.Cast<double, Vector256<double>>(targetLow)[..sources.Length];
        for (var k = 0; k < sources.Length; k++)
        {
            var product = factorHigh * sources[k];
            var error = Vector256.FusedMultiplyAdd(factorHigh, sources[k], -product);
            error = Vector256.FusedMultiplyAdd(factorLow, sources[k], error);
            var sum = highs[k] + product;
            var part = sum - highs[k];
            var rest = (highs[k] - (sum - part)) + (product - part) + (lows[k] + error);
            var total = sum + rest;
            lows[k] = rest - (total - sum);
            highs[k] = total;
        }

        for (var k = sources.Length * Lanes; k < source.Length; k++)
        {
            AddScaled(high, low, source[k], ref targetHigh[k], ref targetLow[k]);
        }
    }

    /// <summary>Adds (high + low) · source to one number.</summary>
    internal static void AddScaled(double high, double low, double source, ref double targetHigh, ref double targetLow)
    {
        var product = high * source;
        var error = Math.FusedMultiplyAdd(high, source, -product);
        (targetHigh, targetLow) = DoubleDouble.Add(targetHigh, targetLow, product, Math.FusedMultiplyAdd(low, source, error));
    }

    /// <summary>The sum of non-negative numbers, with a relative error of at most <see cref="SumError"/>.</summary>
    /// <remarks>Four sums run side by side, for each one waits for its own last addition; merging them loses less than 16 · 3.1 u².</remarks>
    internal static (double High, double Low) Sum(ReadOnlySpan<double> terms)
    {
        var vectors = MemoryMarshal.Cast<double, Vector256<double>>(terms);
        var zero = (High: Vector256<double>.Zero, Low: Vector256<double>.Zero);
        var (first, second, third, fourth) = (zero, zero, zero, zero);
        var next = 0;
        for (; next + 4 <= vectors.Length; next += 4)
        {
            first = Add(first.High, first.Low, vectors[next], Vector256<double>.Zero);
            second = Add(second.High, second.Low, vectors[next + 1], Vector256<double>.Zero);
            third = Add(third.High, third.Low, vectors[next + 2], Vector256<double>.Zero);
            fourth = Add(fourth.High, fourth.Low, vectors[next + 3], Vector256<double>.Zero);
        }

        for (; next < vectors.Length; next++)
        {
            first = Add(first.High, first.Low, vectors[next], Vector256<double>.Zero);
        }

        first = Add(first.High, first.Low, second.High, second.Low);
        third = Add(third.High, third.Low, fourth.High, fourth.Low);
        first = Add(first.High, first.Low, third.High, third.Low);
        var total = (High: 0.0, Low: 0.0);
        for (var lane = 0; lane < Lanes; lane++)
        {
            total = DoubleDouble.Add(total.High, total.Low, first.High[lane], first.Low[lane]);
        }

        foreach (var term in terms[(vectors.Length * Lanes)..])
        {
            total = DoubleDouble.Add(total.High, total.Low, term, 0);
        }

        return total;
    }

    /// <summary>What <see cref="DoubleDouble.Add"/> does, lane by lane.</summary>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    private static (Vector256<double> High, Vector256<double> Low) Add(
        Vector256<double> firstHigh, Vector256<double> firstLow, Vector256<double> secondHigh, Vector256<double> secondLow)
    {
        var sum = firstHigh + secondHigh;
        var part = sum - firstHigh;
        var rest = (firstHigh - (sum - part)) + (secondHigh - part) + (firstLow + secondLow);
        var total = sum + rest;
        return (total, rest - (total - sum));
    }

    /// <summary>The bound on the relative error of adding up so many non-negative numbers or products here: (4 n + 40) u².</summary>
    internal static double SumError(int count) => SecondOrder * ((4.0 * count) + 40) * UnitRoundoff * UnitRoundoff;

    /// <summary>
    /// Σ_j p_j (z − z_j) for numbers z given as high + low, with a bound on its error. Differences of neighbours that are close cancel
    /// before anything is rounded.
    /// </summary>
    /// <remarks>
    /// With d = high − high_j (its error is at most u |d| and found exactly), t = low − low_j, B = Σ p |d|, T = Σ p |t| and m additions in
    /// a lane: rounding t, its sum with the error of d, their product with p and the two additions of each step loses at most
    /// u ((2 m + 8) T + (m + 3)² u B), times 1 + O(m u). Merging the lanes counts as further additions.
    /// </remarks>
    internal static DoubledSum Differences(ReadOnlySpan<double> rates, double high, double low, ReadOnlySpan<double> highs, ReadOnlySpan<double> lows)
    {
        var (ownHigh, ownLow) = (Vector256.Create(high), Vector256.Create(low));
        var rateVectors = MemoryMarshal.Cast<double, Vector256<double>>(rates);
        var highVectors = MemoryMarshal.Cast<double, Vector256<double>>(highs)[..rateVectors.Length];
        var lowVectors = MemoryMarshal.Cast<double, Vector256<double>>(lows)[..rateVectors.Length];
        var (sums, rests, sizes, lowSizes) = (Vector256<double>.Zero, Vector256<double>.Zero, Vector256<double>.Zero, Vector256<double>.Zero);
        for (var k = 0; k < rateVectors.Length; k++)
        {
            var rate = rateVectors[k];
            var difference = ownHigh - highVectors[k];
            var part = difference - ownHigh;
            var lost = (ownHigh - (difference - part)) - (highVectors[k] + part);
            var lowDifference = ownLow - lowVectors[k];
            var product = rate * difference;
            var error = Vector256.FusedMultiplyAdd(rate, difference, -product);
            error = Vector256.FusedMultiplyAdd(rate, lost + lowDifference, error);
            var sum = sums + product;
            part = sum - sums;
            rests += (sums - (sum - part)) + (product - part) + error;
            sums = sum;
            sizes += Vector256.Abs(product);
            lowSizes = Vector256.FusedMultiplyAdd(rate, Vector256.Abs(lowDifference), lowSizes);
        }

        var total = default(DoubledSum);
        for (var lane = 0; lane < Lanes; lane++)
        {
            total.Merge(sums[lane], rests[lane], sizes[lane], lowSizes[lane], rateVectors.Length);
        }

        for (var k = rateVectors.Length * Lanes; k < rates.Length; k++)
        {
            total.AddDifference(rates[k], high, low, highs[k], lows[k]);
        }

        return total;
    }
}
