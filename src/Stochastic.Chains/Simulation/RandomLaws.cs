namespace Stochastic.Chains.Simulation;

/// <summary>Draws from the laws that sampling of chains needs.</summary>
internal static class RandomLaws
{
    private const double FewExpected = 100; // e⁻¹⁰⁰ is far above the smallest double
    private const double SmallestGamma = 2.2250738585072014E-308; // the smallest normal double: what is possible stays possible

    /// <summary>A standard normal number by the polar method. Source: Marsaglia and Bray (1964), SIAM Review 6, 260–264.</summary>
    internal static double NextNormal(this RandomNumbers numbers)
    {
        while (true)
        {
            var x = (2 * numbers.NextDouble()) - 1;
            var y = (2 * numbers.NextDouble()) - 1;
            var square = (x * x) + (y * y);
            if (square is > 0 and < 1)
            {
                return x * Math.Sqrt(-2 * Math.Log(square) / square);
            }
        }
    }

    /// <summary>A gamma number with scale 1, above 0. Source: Marsaglia and Tsang (2000), ACM Trans. Math. Softw. 26, 363–372.</summary>
    internal static double NextGamma(this RandomNumbers numbers, double shape)
    {
        if (shape < 1)
        {
            return Math.Max(SmallestGamma, numbers.NextGamma(shape + 1) * Math.Pow(numbers.NextPositive(), 1 / shape));
        }

        var d = shape - (1.0 / 3);
        var c = 1 / Math.Sqrt(9 * d);
        while (true)
        {
            var x = numbers.NextNormal();
            var v = 1 + (c * x);
            if (v <= 0)
            {
                continue;
            }

            v = v * v * v;
            if (Math.Log(numbers.NextPositive()) < (0.5 * x * x) + d - (d * v) + (d * Math.Log(v)))
            {
                return Math.Max(SmallestGamma, d * v);
            }
        }
    }

    /// <summary>
    /// The number of successes in independent trials. While many are expected, the median of the trials' uniform numbers, which follows a beta law, halves
    /// the trials; the rest by inversion. Sources: Relles (1972), J. Amer. Statist. Assoc. 67, 612–613; Devroye, Non-Uniform Random Variate Generation,
    /// 1986, chapter X.4.
    /// </summary>
    internal static long NextBinomial(this RandomNumbers numbers, long trials, double probability)
    {
        var successes = 0L;
        while (trials * Math.Min(probability, 1 - probability) > FewExpected)
        {
            var rank = (trials / 2) + 1; // of the median among the uniform numbers in ascending order
            var (left, right) = (numbers.NextGamma(rank), numbers.NextGamma(trials + 1 - rank));
            var median = left / (left + right);
            if (median <= probability)
            {
                successes += rank;
                trials -= rank;
                probability = (probability - median) / (1 - median);
            }
            else
            {
                trials = rank - 1;
                probability /= median;
            }
        }

        return successes + (probability <= 0.5 ? numbers.NextFewSuccesses(trials, probability) : trials - numbers.NextFewSuccesses(trials, 1 - probability));
    }

    /// <summary>The smallest number whose cumulative probability passes a uniform one, adding up from 0.</summary>
    private static long NextFewSuccesses(this RandomNumbers numbers, long trials, double probability)
    {
        var odds = probability / (1 - probability);
        var none = Math.Exp(trials * double.LogP1(-probability));
        while (true)
        {
            var (rest, term) = (numbers.NextDouble(), none);
            for (var successes = 0L; successes <= trials; successes++)
            {
                if (rest < term)
                {
                    return successes;
                }

                rest -= term;
                term *= odds * (trials - successes) / (successes + 1);
            }
        }
    }

    /// <summary>A number above 0 and at most 1.</summary>
    private static double NextPositive(this RandomNumbers numbers) => 1 - numbers.NextDouble();
}
