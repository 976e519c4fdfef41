namespace Stochastic.Chains.Kernels;

/// <summary>Euclid's algorithm.</summary>
internal static class Divisors
{
    /// <summary>The greatest common divisor of two non-negative numbers; of zero and a number, the number.</summary>
    internal static long Greatest(long first, long second)
    {
        while (second != 0)
        {
            (first, second) = (second, first % second);
        }

        return first;
    }

    /// <summary>The least common multiple of two positive numbers.</summary>
    /// <exception cref="OverflowException">It does not fit into 63 bits.</exception>
    internal static long LeastCommonMultiple(long first, long second) => checked(first / Greatest(first, second) * second);
}
