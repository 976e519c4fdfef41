using System.Runtime.InteropServices;
using System.Runtime.Intrinsics;

namespace Stochastic.Chains.Kernels;

/// <summary>
/// State reduction in twice the working precision: <see cref="GeneralReduction{TNumber}"/> of <see cref="ScaledDoubleDouble"/> with a fast
/// path for tables all of whose products are of ordinary size.
/// </summary>
/// <remarks>
/// The argument of <see cref="SubtractionFreeBound"/> with <see cref="ScaledDoubleDouble.OperationError"/> in place of u gives the a priori
/// bound of every answer; it is below 10⁻¹⁹ up to n of about 10,000. The double nearest to such a number is then off by
/// that much and one rounding, u: the correctly rounded answer, or the neighbour when the exact one lies within the bound of a tie.
/// </remarks>
internal static class DoubledElimination
{
    /// <summary>The largest system for which the elimination is repeated for a proof.</summary>
    internal const int MostStates = 500;

    /// <summary>Four units of rounding: a bound as good as this is not worth repeating an elimination for.</summary>
    internal const double GoodEnough = 4 * UnitRoundoff;

    private const double UnitRoundoff = 1.1102230246251565e-16;
    private const double SmallestProduct = 1.1830521861667747e-271;
    private const double LargestNumber = 1 / SmallestProduct;

    /// <summary>The bound on the relative error of an answer in twice the precision; +∞ where it would be no better than one in double.</summary>
    internal static double WideErrorBound(int pivots, int columns, int merges)
    {
        var roundings = SubtractionFreeBound.RoundingsOfElimination(pivots, columns, merges);
        var doubled = Upward.Multiply(roundings * SubtractionFreeBound.SecondOrder, ScaledDoubleDouble.OperationError);
        return doubled <= UnitRoundoff ? doubled : double.PositiveInfinity;
    }

    /// <summary>The bound on the relative error of an answer after it was rounded to a double: little more than u.</summary>
    internal static double RelativeErrorBound(int pivots, int columns, int merges)
    {
        var doubled = WideErrorBound(pivots, columns, merges);
        return doubled <= UnitRoundoff ? Upward.Add(UnitRoundoff, Upward.Multiply(doubled, 1 + (2 * UnitRoundoff))) : double.PositiveInfinity;
    }

    /// <summary>
    /// Does what <see cref="GeneralReduction{TNumber}.Eliminate"/> does, in vectors of plain doubles; false, with the table untouched, when
    /// a product or quotient could fall below 2⁻⁹⁰⁰ or exceed 2⁹⁰⁰.
    /// </summary>
    /// <param name="table">Rates, row-major: row = from, column = to; overwritten by the factors.</param>
    /// <param name="rows">The number of rows.</param>
    /// <param name="columns">The number of columns.</param>
    /// <param name="sums">Receives the pivots; as many states are eliminated.</param>
    /// <param name="cancellation">Looked at once for each state.</param>
    internal static bool TryEliminate(ScaledDoubleDouble[] table, int rows, int columns, ScaledDoubleDouble[] sums, CancellationToken cancellation)
    {
        var highs = new double[table.Length];
        var lows = new double[table.Length];
        for (var k = 0; k < table.Length; k++)
        {
            if (!table[k].TryGetParts(out highs[k], out lows[k]))
            {
                return false;
            }
        }

        for (var pivot = 0; pivot < sums.Length; pivot++)
        {
            cancellation.ThrowIfCancellationRequested();
            if (!TryEliminate(highs, lows, rows, columns, pivot, out var high, out var low))
            {
                return false;
            }

            sums[pivot] = ScaledDoubleDouble.OfParts(high, low);
        }

        for (var k = 0; k < table.Length; k++)
        {
            table[k] = ScaledDoubleDouble.OfParts(highs[k], lows[k]);
        }

        return true;
    }

    private static bool TryEliminate(double[] highs, double[] lows, int rows, int columns, int pivot, out double sumHigh, out double sumLow)
    {
        var first = (pivot * columns) + pivot + 1;
        var width = columns - pivot - 1;
        var rateHighs = highs.AsSpan(first, width);
        var rateLows = lows.AsSpan(first, width);
        var smallest = double.PositiveInfinity;
        (sumHigh, sumLow) = (0, 0);
        for (var k = 0; k < width; k++)
        {
            (sumHigh, sumLow) = DoubleDouble.Add(sumHigh, sumLow, rateHighs[k], rateLows[k]);
            smallest = rateHighs[k] == 0 ? smallest : Math.Min(smallest, rateHighs[k]);
        }

        for (var row = pivot + 1; row < rows; row++)
        {
            var place = (row * columns) + pivot;
            if (highs[place] == 0)
            {
                continue;
            }

            var (high, low) = DoubleDouble.Divide(highs[place], lows[place], sumHigh, sumLow);
            if (!(Math.Min(high, 1) * Math.Min(smallest, 1) >= SmallestProduct && high * sumHigh <= LargestNumber && sumHigh <= LargestNumber))
            {
                return false;
            }

            (highs[place], lows[place]) = (high, low);
            AddScaled(high, low, rateHighs, rateLows, highs.AsSpan(place + 1, width), lows.AsSpan(place + 1, width));
        }

        return true;
    }

    /// <summary>Adds factor · source to target; the product is not renormalized before the sum, which costs 13 u² in place of 9 u².</summary>
    private static void AddScaled(
        double high, double low, ReadOnlySpan<double> sourceHighs, ReadOnlySpan<double> sourceLows, Span<double> targetHighs, Span<double> targetLows)
    {
        var (factorHigh, factorLow) = (Vector256.Create(high), Vector256.Create(low));
        var sourceHigh = MemoryMarshal.Cast<double, Vector256<double>>(sourceHighs);
        var sourceLow = MemoryMarshal.Cast<double, Vector256<double>>(sourceLows)[..sourceHigh.Length];
        var targetHigh = MemoryMarshal.Cast<double, Vector256<double>>(targetHighs)[..sourceHigh.Length];
        var targetLow = MemoryMarshal.Cast<double, Vector256<double>>(targetLows)[..sourceHigh.Length];
        for (var k = 0; k < sourceHigh.Length; k++)
        {
            var product = factorHigh * sourceHigh[k];
            var error = Vector256.FusedMultiplyAdd(factorHigh, sourceHigh[k], -product);
            error = Vector256.FusedMultiplyAdd(factorLow, sourceHigh[k], error);
            error = Vector256.FusedMultiplyAdd(factorHigh, sourceLow[k], error);
            var sum = targetHigh[k] + product;
            var part = sum - targetHigh[k];
            var rest = (targetHigh[k] - (sum - part)) + (product - part);
            rest += targetLow[k] + error;
            var total = sum + rest;
            targetLow[k] = rest - (total - sum);
            targetHigh[k] = total;
        }

        for (var k = sourceHigh.Length * Vector256<double>.Count; k < sourceHighs.Length; k++)
        {
            var (productHigh, productLow) = DoubleDouble.Multiply(high, low, sourceHighs[k], sourceLows[k]);
            (targetHighs[k], targetLows[k]) = DoubleDouble.Add(targetHighs[k], targetLows[k], productHigh, productLow);
        }
    }
}
