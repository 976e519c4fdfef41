namespace Stochastic.Chains.Kernels;

/// <summary>A positive vector brought to the upper end of the range of doubles by an exact power of two, so that flows have room below.</summary>
internal static class ScaledWeights
{
    private const int SmallestExponent = -1074;
    private const int LargestExponent = 1024;

    /// <summary>
    /// Multiplies the values of some states by 2^scale so that the largest lies from 2^exponent up to its double; false when a value is
    /// not positive and finite, or not normal afterwards.
    /// </summary>
    internal static bool TryScale(
        ReadOnlySpan<int> states, ReadOnlySpan<double> values, int exponent, out double[] weights, out int scale)
    {
        weights = new double[values.Length];
        var largest = 0.0;
        foreach (var state in states)
        {
            largest = Math.Max(largest, values[state]);
        }

        scale = largest > 0 && double.IsFinite(largest) ? exponent - Math.ILogB(largest) : 0;
        foreach (var state in states)
        {
            weights[state] = Math.ScaleB(values[state], scale);
            if (!(weights[state] > 0 && double.IsNormal(weights[state])))
            {
                return false;
            }
        }

        return true;
    }

    /// <summary>An upper bound of |Σ x_i − 1|, from the exact sum.</summary>
    internal static double DeviationFromOne(ReadOnlySpan<int> states, ReadOnlySpan<double> values)
    {
        const int Outside = 0;
        const int Sum = 1;
        var sums = new ExactSums(2, SmallestExponent, LargestExponent);
        sums.Move(Sum, Outside, UInt128.One, 0, 1);
        foreach (var state in states)
        {
            var value = Significand.Of(values[state]);
            sums.Move(Outside, Sum, value.Bits, value.Exponent, 1);
        }

        return sums.UpperMagnitude(Sum, 0);
    }
}
