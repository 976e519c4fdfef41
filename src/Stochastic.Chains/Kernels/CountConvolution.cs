namespace Stochastic.Chains.Kernels;

/// <summary>
/// The law of a sum of independent whole numbers, by convolution of non-negative numbers. Tails that matter to nobody are cut off, and what
/// was cut is added up.
/// </summary>
internal sealed class CountConvolution
{
    /// <summary>What a tail must weigh to be kept, and where a binomial law is cut: far below a rounding of one.</summary>
    private const double Negligible = 1e-30;

    private double[] _probabilities = [1];
    private double _roundings;
    private double _leftOut;

    /// <summary>The number that the first probability belongs to.</summary>
    internal long First { get; private set; }

    internal ReadOnlySpan<double> Probabilities => _probabilities;

    /// <summary>A bound on how far the probability of any set of numbers is off.</summary>
    internal double AbsoluteErrorBound => SubtractionFreeBound.OfRoundings(_roundings + 8) + (_leftOut * SubtractionFreeBound.SecondOrder);

    /// <summary>Adds the number of successes in some trials, all of one probability.</summary>
    internal void AddBinomial(long trials, double probability)
    {
        var weights = ModeWeights.Binomial(trials, probability, Negligible);
        var law = new double[weights.Values.Length];
        VectorLoops.Divide(weights.Values, weights.Sum, law);
        _leftOut += weights.LeftOut / weights.Sum;
        _roundings += (2.0 * ModeWeights.RoundingsPerQuotient * weights.Reach) + 4 + (2.0 * Math.Min(law.Length, _probabilities.Length));
        First += weights.First;
        _probabilities = Convolve(_probabilities, law);
        Trim();
    }

    private static double[] Convolve(double[] first, double[] second)
    {
        var (longer, shorter) = first.Length >= second.Length ? (first, second) : (second, first);
        var result = new double[longer.Length + shorter.Length - 1];
        for (var k = 0; k < shorter.Length; k++)
        {
            VectorLoops.AddScaled(shorter[k], longer, result.AsSpan(k, longer.Length));
        }

        return result;
    }

    private void Trim()
    {
        var (start, end) = (0, _probabilities.Length);
        for (var cut = 0.0; start < end - 1 && cut + _probabilities[start] <= Negligible; start++)
        {
            cut += _probabilities[start];
        }

        for (var cut = 0.0; end > start + 1 && cut + _probabilities[end - 1] <= Negligible; end--)
        {
            cut += _probabilities[end - 1];
        }

        _leftOut += 2 * Negligible;
        First += start;
        _probabilities = _probabilities[start..end];
    }
}
