using System.Numerics;
using Stochastic.Chains.Kernels;

namespace Stochastic.Chains.Steps;

/// <summary>Rows of V Λⁿ W, made into probabilities.</summary>
internal static class SpectralPower
{
    /// <summary>The powers of the eigenvalues, by squaring.</summary>
    internal static Complex[] Powers(Complex[] eigenvalues, long steps) => Array.ConvertAll(eigenvalues, value => Power(value, steps));

    /// <summary>The whole table.</summary>
    internal static double[] Table(SpectralFactors factors, Complex[] powers, WorkSharing sharing)
    {
        var order = factors.Order;
        var scaled = new double[order * order];
        for (var row = 0; row < order; row++)
        {
            factors.MultiplyRight(powers, factors.Right.AsSpan(row * order, order), scaled.AsSpan(row * order, order));
        }

        return SpectralTables.Product(scaled, factors.Left, order, sharing);
    }

    /// <summary>One row.</summary>
    internal static double[] Row(SpectralFactors factors, Complex[] powers, int row)
    {
        var order = factors.Order;
        var scaled = new double[order];
        var values = new double[order];
        factors.MultiplyRight(powers, factors.Right.AsSpan(row * order, order), scaled);
        RowCombinations.OfOne(scaled, factors.Left, values);
        return values;
    }

    /// <summary>
    /// Sets what is impossible to zero, takes the rest back into [0, 1], which brings it no farther from the truth, and divides each row by
    /// its sum. A row of which nothing positive is left is spread evenly over what is possible: its certificate then proves nothing. Returns
    /// the largest relative change by a division.
    /// </summary>
    internal static double MakeProbabilities(Span<double> values, int order, Func<int, bool> isPossible)
    {
        var largest = 0.0;
        for (var start = 0; start < values.Length; start += order)
        {
            var row = values.Slice(start, order);
            for (var column = 0; column < order; column++)
            {
                row[column] = isPossible(start + column) && row[column] > 0 ? Math.Min(1, row[column]) : 0;
            }

            if (VectorLoops.Sum(row) == 0)
            {
                for (var column = 0; column < order; column++)
                {
                    row[column] = isPossible(start + column) ? 1 : 0;
                }

                largest = double.PositiveInfinity;
            }

            var sum = VectorLoops.Sum(row);
            VectorLoops.Divide(row, sum, row);
            largest = Math.Max(largest, Math.Abs(sum - 1) / Math.Min(1, sum));
        }

        return largest;
    }

    private static Complex Power(Complex value, long steps)
    {
        var power = Complex.One;
        for (var digit = BitOperations.Log2((ulong)Math.Max(1, steps)); digit >= 0; digit--)
        {
            power *= power;
            power = ((steps >> digit) & 1) == 1 ? power * value : power;
        }

        return power;
    }
}
