using System.Runtime.InteropServices;
using System.Runtime.Intrinsics;

namespace Stochastic.Chains.Kernels;

/// <summary>Sums of multiples of the rows of a row-major n × n table.</summary>
internal static class RowCombinations
{
    private const int GroupSize = 4;
    private const int Lanes = 8;

    /// <summary>One combination, overwriting sum. O(n) for each factor that is not zero.</summary>
    internal static void OfOne(ReadOnlySpan<double> factors, ReadOnlySpan<double> table, Span<double> sum)
    {
        sum.Clear();
        for (var row = 0; row < factors.Length; row++)
        {
            if (factors[row] != 0)
            {
                VectorLoops.AddScaled(factors[row], table.Slice(row * sum.Length, sum.Length), sum);
            }
        }
    }

    /// <summary>
    /// n combinations at once, factors and sums one below the other: four of them by eight columns are kept in registers. Leading and
    /// trailing zeros of factors cost nothing. Sums must not overlap the rest.
    /// </summary>
    internal static void OfMany(ReadOnlySpan<double> factors, ReadOnlySpan<double> table, int order, Span<double> sums)
    {
        if (order < Lanes)
        {
            for (var row = 0; row < order; row++)
            {
                OfOne(factors.Slice(row * order, order), table, sums.Slice(row * order, order));
            }

            return;
        }

        var ranges = GroupRanges(factors, order);
        for (var column = 0; column < order; column += Lanes)
        {
            for (var group = 0; group < ranges.Length; group++)
            {
                // The last tile of a row or column reaches back over its neighbor: the same sums again.
                var row = Math.Min(group * GroupSize, order - GroupSize);
                Tile(factors[(row * order)..], table, order, Math.Min(column, order - Lanes), ranges[group], sums[(row * order)..]);
            }
        }
    }

    private static Range[] GroupRanges(ReadOnlySpan<double> factors, int order)
    {
        var ranges = new Range[(order + GroupSize - 1) / GroupSize];
        for (var group = 0; group < ranges.Length; group++)
        {
            var (start, end) = (order, 0);
            for (var row = 0; row < GroupSize; row++)
            {
                var line = factors.Slice((Math.Min(group * GroupSize, order - GroupSize) + row) * order, order);
                var first = line.IndexOfAnyExcept(0.0);
                start = first < 0 ? start : Math.Min(start, first);
                end = Math.Max(end, line.LastIndexOfAnyExcept(0.0) + 1);
            }

            ranges[group] = Math.Min(start, end)..end;
        }

        return ranges;
    }

    private static void Tile(ReadOnlySpan<double> factors, ReadOnlySpan<double> table, int order, int column, Range range, Span<double> sums)
    {
        var (start, length) = range.GetOffsetAndLength(order);
        var factors0 = factors.Slice(start, length);
        var factors1 = factors.Slice(order + start, factors0.Length);
        var factors2 = factors.Slice((2 * order) + start, factors0.Length);
        var factors3 = factors.Slice((3 * order) + start, factors0.Length);
        Vector256<double> left0 = default, left1 = default, left2 = default, left3 = default;
        Vector256<double> right0 = default, right1 = default, right2 = default, right3 = default;
        var position = (start * order) + column;
        for (var index = 0; index < factors0.Length; index++, position += order)
        {
            var entries = MemoryMarshal.Cast<double, Vector256<double>>(table.Slice(position, Lanes));
            var (left, right) = (entries[0], entries[1]);
            var factor = Vector256.Create(factors0[index]);
            left0 = Vector256.MultiplyAddEstimate(factor, left, left0);
            right0 = Vector256.MultiplyAddEstimate(factor, right, right0);
            factor = Vector256.Create(factors1[index]);
            left1 = Vector256.MultiplyAddEstimate(factor, left, left1);
            right1 = Vector256.MultiplyAddEstimate(factor, right, right1);
            factor = Vector256.Create(factors2[index]);
            left2 = Vector256.MultiplyAddEstimate(factor, left, left2);
            right2 = Vector256.MultiplyAddEstimate(factor, right, right2);
            factor = Vector256.Create(factors3[index]);
            left3 = Vector256.MultiplyAddEstimate(factor, left, left3);
            right3 = Vector256.MultiplyAddEstimate(factor, right, right3);
        }

        Store(left0, right0, sums[column..]);
        Store(left1, right1, sums[(order + column)..]);
        Store(left2, right2, sums[((2 * order) + column)..]);
        Store(left3, right3, sums[((3 * order) + column)..]);
    }

    private static void Store(Vector256<double> left, Vector256<double> right, Span<double> sums)
    {
        left.CopyTo(sums);
        right.CopyTo(sums[Vector256<double>.Count..]);
    }
}
