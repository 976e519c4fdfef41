using MathNet.Numerics;

namespace Stochastic.Chains.Estimation;

/// <summary>The upper tail of the chi-square law, small probabilities included.</summary>
internal static class ChiSquareTail
{
    /// <summary>The probability of more than the value; 1 where nothing is tested.</summary>
    internal static double Of(double value, long degreesOfFreedom) => degreesOfFreedom switch
    {
        0 => 1,
        1 => SpecialFunctions.Erfc(Math.Sqrt(value / 2)),
        _ => SpecialFunctions.GammaUpperRegularized(degreesOfFreedom / 2.0, value / 2),
    };
}
