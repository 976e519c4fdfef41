using Stochastic.Chains.Internal;

namespace Stochastic.Chains.Kernels;

/// <summary>Brings a square matrix to size one by a power of two, which rounds nothing above the subnormal range.</summary>
internal static class PowerOfTwoScale
{
    /// <summary>
    /// Brings the largest entry to between one and four and returns the exponent that was taken out; 0 for the zero matrix. Refuses a
    /// matrix that is not n × n or has entries that are not finite.
    /// </summary>
    internal static int Normalize(Span<double> matrix, int order)
    {
        var exponent = Exponent(matrix, order);
        Apply(matrix, -exponent);
        return exponent;
    }

    /// <summary>Multiplies each entry by 2^exponent.</summary>
    internal static void Apply(Span<double> matrix, int exponent)
    {
        if (exponent == 0)
        {
            return;
        }

        foreach (ref var entry in matrix)
        {
            entry = Math.ScaleB(entry, exponent);
        }
    }

    // Rounded down to an even one, so that square roots of entries scale exactly too.
    private static int Exponent(ReadOnlySpan<double> matrix, int order)
    {
        if (order < 1 || matrix.Length != (long)order * order)
        {
            throw new ArgumentException(Messages.MatrixNotSquare(matrix.Length, order), nameof(matrix));
        }

        var largest = 0.0;
        for (var index = 0; index < matrix.Length; index++)
        {
            if (!double.IsFinite(matrix[index]))
            {
                throw new ArgumentException(Messages.MatrixEntryNotFinite(index / order, index % order, matrix[index]), nameof(matrix));
            }

            largest = Math.Max(largest, Math.Abs(matrix[index]));
        }

        return largest == 0 ? 0 : Math.ILogB(largest) & ~1;
    }
}
