using MathNet.Numerics;
using MathNet.Numerics.Distributions;

namespace Stochastic.Chains.Estimation;

/// <summary>Intervals for one probability of a row.</summary>
internal static class RowIntervals
{
    private const int Halvings = 200;

    /// <summary>
    /// The score interval for a binomial proportion. Source: Wilson (1927), J. Amer. Statist. Assoc. 22, 209–212; recommended by Brown, Cai and
    /// DasGupta (2001), Statist. Sci. 16, 101–133. Without observations it is 0 to 1.
    /// </summary>
    internal static Interval Score(long count, long total, double level)
    {
        var z = Normal.InvCDF(0, 1, (1 + level) / 2);
        var (n, x, square) = ((double)total, (double)count, z * z);
        var middle = (x + (square / 2)) / (n + square);
        var half = z / (n + square) * Math.Sqrt((n > 0 ? x * (n - x) / n : 0) + (square / 4));
        var lower = count == 0 ? 0 : Math.Max(0, middle - half);
        var upper = count == total ? 1 : Math.Min(1, middle + half);
        return new Interval(lower, upper, level);
    }

    /// <summary>The equal-tailed credible interval of a beta distribution, the law of one entry of a Dirichlet row.</summary>
    internal static Interval Credible(double weight, double otherWeights, double level)
    {
        var tail = (1 - level) / 2;
        return new Interval(BetaQuantile(weight, otherWeights, tail), 1 - BetaQuantile(otherWeights, weight, tail), level);
    }

    /// <summary>The point below which a beta distribution has the given probability, by bisection of its logarithm, so that tiny points keep their digits.</summary>
    internal static double BetaQuantile(double a, double b, double probability)
    {
        var (low, high) = (Math.Log(double.Epsilon), 0.0);
        for (var k = 0; k < Halvings; k++)
        {
            var middle = low + ((high - low) / 2);
            if (middle == low || middle == high)
            {
                break;
            }

            if (SpecialFunctions.BetaRegularized(a, b, Math.Exp(middle)) < probability)
            {
                low = middle;
            }
            else
            {
                high = middle;
            }
        }

        return Math.Exp(high);
    }
}
