namespace Stochastic.Chains.Tests.Support;

/// <summary>Chains whose difficulty is their pattern.</summary>
internal static class StructuredFamilies
{
    public static double[,] Identity(int size, SplitMix64 random)
    {
        var matrix = new double[size, size];
        for (var i = 0; i < size; i++)
        {
            matrix[i, i] = 1;
        }

        return matrix;
    }

    /// <summary>Every state moves to one other with certainty: cycles of all lengths, fixed points included.</summary>
    public static double[,] Permutation(int size, SplitMix64 random)
    {
        var next = random.NextPermutation(size);
        var matrix = new double[size, size];
        for (var i = 0; i < size; i++)
        {
            matrix[i, next[i]] = 1;
        }

        return matrix;
    }

    /// <summary>A walk on a line, turned back at both ends: period two.</summary>
    public static double[,] ReflectingPath(int size, SplitMix64 random)
    {
        var matrix = new double[size, size];
        matrix[0, 1] = 1;
        matrix[size - 1, size - 2] = 1;
        for (var i = 1; i < size - 1; i++)
        {
            matrix[i, i + 1] = random.NextFactor();
            matrix[i, i - 1] = 1 - matrix[i, i + 1];
        }

        return matrix;
    }

    /// <summary>
    /// Not diagonalizable: stay with probability s, advance with q (the last state stays instead), go back to state 0 otherwise. Modulo the
    /// constant vector it is s times the identity plus q times a shift, one Jordan block of size n - 1 for the eigenvalue s. Probabilities
    /// are multiples of 1/64, so the doubles hold it exactly.
    /// </summary>
    public static double[,] Defective(int size, SplitMix64 random)
    {
        var advance = random.Next(8, 40) / 64.0;
        var stay = random.Next(0, 16) / 64.0;
        var matrix = new double[size, size];
        for (var i = 0; i < size; i++)
        {
            matrix[i, i] += stay;
            matrix[i, Math.Min(i + 1, size - 1)] += advance;
            matrix[i, 0] += 1 - stay - advance;
        }

        return matrix;
    }
}
