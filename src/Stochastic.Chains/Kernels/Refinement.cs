namespace Stochastic.Chains.Kernels;

/// <summary>When iterative refinement goes on, and how a correction is taken in.</summary>
internal static class Refinement
{
    /// <summary>The most corrections of one solution.</summary>
    internal const int MostSteps = 3;

    /// <summary>Half a unit in the last place: the rounding of the answer to a double that nothing can avoid.</summary>
    internal const double UnitRoundoff = 1.1102230246251565e-16;

    /// <summary>A relative error before the last rounding with which there is nothing left to gain.</summary>
    internal const double GoodEnough = UnitRoundoff / 16;

    private const double LargestCorrection = 1.0 / 16;

    /// <summary>Adds corrections to numbers high + low; false when one is so large that refinement cannot be contracting.</summary>
    internal static bool TryCorrect(ReadOnlySpan<int> states, ReadOnlySpan<double> corrections, double[] highs, double[] lows)
    {
        for (var k = 0; k < corrections.Length; k++)
        {
            var state = states[k];
            if (!(Math.Abs(corrections[k]) <= LargestCorrection * highs[state]))
            {
                return false;
            }

            (highs[state], lows[state]) = DoubleDouble.Add(highs[state], lows[state], corrections[k], 0);
        }

        return true;
    }
}
