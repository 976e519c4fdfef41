using System.Runtime.InteropServices;
using System.Runtime.Intrinsics;

namespace Stochastic.Chains.Kernels;

/// <summary>Makes the rows of a product of non-negative tables sum to one.</summary>
internal static class SquaringRows
{
    private const int Lanes = 4;
    private const int Group = 4 * Lanes;

    /// <summary>
    /// Divides a row by its sum and returns the sum. Each quotient is off by at most two roundings, and none is above one: a rounded sum of
    /// non-negative terms is never below one of them.
    /// </summary>
    internal static double Normalize(Span<double> row)
    {
        var sum = Sum(row);
        var vectors = MemoryMarshal.Cast<double, Vector256<double>>(row);
        var (divisor, reciprocal) = (Vector256.Create(sum), Vector256.Create(1 / sum));
        for (var index = 0; index < vectors.Length; index++)
        {
            // A product with the reciprocal, corrected once (Markstein 1990): several times as fast as a division.
            var quotient = vectors[index] * reciprocal;
            var rest = Vector256.FusedMultiplyAdd(-quotient, divisor, vectors[index]);
            vectors[index] = Vector256.MinNative(Vector256.FusedMultiplyAdd(rest, reciprocal, quotient), Vector256<double>.One);
        }

        foreach (ref var entry in row[(vectors.Length * Lanes)..])
        {
            entry /= sum;
        }

        return sum;
    }

    /// <summary>The sum, gathered in sixteen lanes: at most n/16 + 5 roundings lie between a term and the result, or n/4 + 3 of few terms.</summary>
    private static double Sum(ReadOnlySpan<double> terms)
    {
        if (terms.Length < 2 * Group)
        {
            return VectorLoops.Sum(terms);
        }

        var whole = terms.Length / Group * Group;
        var vectors = MemoryMarshal.Cast<double, Vector256<double>>(terms[..whole]);
        var (first, second, third, fourth) = (vectors[0], vectors[1], vectors[2], vectors[3]);
        for (var index = 4; index + 3 < vectors.Length; index += 4)
        {
            first += vectors[index];
            second += vectors[index + 1];
            third += vectors[index + 2];
            fourth += vectors[index + 3];
        }

        var lanes = (first + second) + (third + fourth);
        return ((lanes[0] + lanes[1]) + (lanes[2] + lanes[3])) + VectorLoops.Sum(terms[whole..]);
    }
}
