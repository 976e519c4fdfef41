namespace Stochastic.Chains.Simulation;

/// <summary>Draws from the laws that sampling of chains needs.</summary>
internal static class RandomLaws
{
    private const int FewTrials = 16;
    private const double SmallestGamma = 2.2250738585072014E-308; // the smallest normal double: what is possible stays possible

    /// <summary>A standard normal number by the polar method. Source: Marsaglia and Bray (1964), SIAM Review 6, 260–264.</summary>
    internal static double NextNormal(this RandomStream stream)
    {
        while (true)
        {
            var x = (2 * stream.NextDouble()) - 1;
            var y = (2 * stream.NextDouble()) - 1;
            var square = (x * x) + (y * y);
            if (square is > 0 and < 1)
            {
                return x * Math.Sqrt(-2 * Math.Log(square) / square);
            }
        }
    }

    /// <summary>A gamma number with scale 1, above 0. Source: Marsaglia and Tsang (2000), ACM Trans. Math. Softw. 26, 363–372.</summary>
    internal static double NextGamma(this RandomStream stream, double shape)
    {
        if (shape < 1)
        {
            return Math.Max(SmallestGamma, stream.NextGamma(shape + 1) * Math.Pow(stream.NextPositive(), 1 / shape));
        }

        var d = shape - (1.0 / 3);
        var c = 1 / Math.Sqrt(9 * d);
        while (true)
        {
            var x = stream.NextNormal();
            var v = 1 + (c * x);
            if (v <= 0)
            {
                continue;
            }

            v = v * v * v;
            if (Math.Log(stream.NextPositive()) < (0.5 * x * x) + d - (d * v) + (d * Math.Log(v)))
            {
                return Math.Max(SmallestGamma, d * v);
            }
        }
    }

    /// <summary>
    /// The number of successes in independent trials: the median of the trials' uniform numbers follows a beta law and halves their number, again and
    /// again. Source: Relles (1972), J. Amer. Statist. Assoc. 67, 612–613; Devroye, Non-Uniform Random Variate Generation, 1986, chapter X.4.
    /// </summary>
    internal static long NextBinomial(this RandomStream stream, long trials, double probability)
    {
        var successes = 0L;
        while (trials > FewTrials && probability is > 0 and < 1)
        {
            var rank = (trials / 2) + 1; // of the median among the uniform numbers in ascending order
            var (left, right) = (stream.NextGamma(rank), stream.NextGamma(trials + 1 - rank));
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

        if (probability >= 1)
        {
            return successes + trials;
        }

        for (; trials > 0 && probability > 0; trials--)
        {
            successes += stream.NextDouble() < probability ? 1 : 0;
        }

        return successes;
    }

    /// <summary>A number above 0 and at most 1.</summary>
    private static double NextPositive(this RandomStream stream) => 1 - stream.NextDouble();
}
