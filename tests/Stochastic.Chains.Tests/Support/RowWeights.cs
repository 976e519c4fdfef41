using System.Globalization;

namespace Stochastic.Chains.Tests.Support;

/// <summary>From non-negative weights to transition probabilities.</summary>
internal static class RowWeights
{
    /// <summary>Correctly rounded on every machine, which a power function is not.</summary>
    public static double PowerOfTen(int exponent) =>
        double.Parse(string.Create(CultureInfo.InvariantCulture, $"1e{exponent}"), CultureInfo.InvariantCulture);

    /// <summary>Every row divided by its sum.</summary>
    public static double[,] Normalized(double[,] weights)
    {
        var count = weights.GetLength(0);
        var matrix = new double[count, count];
        for (var i = 0; i < count; i++)
        {
            var sum = 0.0;
            for (var j = 0; j < count; j++)
            {
                sum += weights[i, j];
            }

            for (var j = 0; j < count; j++)
            {
                matrix[i, j] = weights[i, j] / sum;
            }
        }

        return matrix;
    }

    /// <summary>The off-diagonals as they are and what is left of one on the diagonal.</summary>
    public static double[,] WithStays(double[,] offDiagonals)
    {
        var count = offDiagonals.GetLength(0);
        var matrix = (double[,])offDiagonals.Clone();
        for (var i = 0; i < count; i++)
        {
            var sum = 0.0;
            for (var j = 0; j < count; j++)
            {
                sum += i == j ? 0 : offDiagonals[i, j];
            }

            matrix[i, i] = sum < 1 ? 1 - sum : throw new InvalidOperationException($"Row {i} leaves nothing for the diagonal.");
        }

        return matrix;
    }
}
