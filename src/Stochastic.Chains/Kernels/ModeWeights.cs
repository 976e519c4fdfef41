namespace Stochastic.Chains.Kernels;

/// <summary>
/// The Poisson and the binomial law as weights relative to the largest, found by quotients of neighbours from the mode outwards, so that nothing
/// under- or overflows whatever the mean (Fox and Glynn 1988, Communications of the ACM 31, 440–445). Quotients of neighbours only fall from the
/// mode outwards, so what lies beyond the last weight is at most a geometric series.
/// </summary>
/// <remarks>Relative to the mode, the weight k is off by at most |k − mode| · <see cref="RoundingsPerQuotient"/> roundings.</remarks>
internal sealed class ModeWeights
{
    internal const int RoundingsPerQuotient = 6;

    private readonly double[] _weights;
    private readonly Func<long, double> _upward;
    private readonly double _beyondFirst;

    /// <param name="mode">Where the weight is 1.</param>
    /// <param name="upward">The quotient of the weight k + 1 and the weight k; 0 from the last one on.</param>
    /// <param name="downward">The quotient of the weight k − 1 and the weight k.</param>
    /// <param name="smallest">Weights below it are left out.</param>
    private ModeWeights(long mode, Func<long, double> upward, Func<long, double> downward, double smallest)
    {
        _upward = upward;
        var below = Walk(mode, -1, downward, smallest);
        var above = Walk(mode, 1, upward, smallest);
        below.Reverse();
        _weights = [.. below, 1, .. above];
        First = mode - below.Count;
        Mode = mode;
        _beyondFirst = First == 0 ? 0 : Beyond(_weights[0], downward(First));
        Sum = CompensatedSum.Of(_weights);
    }

    /// <summary>The number that the first weight belongs to.</summary>
    internal long First { get; }

    internal long Mode { get; }

    internal long Last => First + _weights.Length - 1;

    /// <summary>The sum of all weights that are kept.</summary>
    internal double Sum { get; }

    internal ReadOnlySpan<double> Values => _weights;

    /// <summary>The most quotients that lie between a weight and the mode.</summary>
    internal long Reach => Math.Max(Mode - First, Last - Mode);

    /// <summary>A bound on the sum of all weights that were left out on either side.</summary>
    internal double LeftOut => _beyondFirst + BeyondWeight(Last);

    /// <summary>The weight of a number; 0 where none is kept.</summary>
    internal double this[long number] => number >= First && number <= Last ? _weights[number - First] : 0;

    /// <summary>The weights of the Poisson law.</summary>
    /// <param name="mean">The mean, 0 or more.</param>
    /// <param name="smallest">Weights below it, relative to the largest, are left out.</param>
    internal static ModeWeights Poisson(double mean, double smallest) =>
        new((long)mean, number => mean / (number + 1), number => number / mean, smallest);

    /// <summary>The weights of the binomial law.</summary>
    /// <param name="trials">The number of trials.</param>
    /// <param name="probability">The probability of success, from 0 to 1.</param>
    /// <param name="smallest">Weights below it, relative to the largest, are left out.</param>
    internal static ModeWeights Binomial(long trials, double probability, double smallest)
    {
        if (probability == 0 || probability >= 1)
        {
            return new(probability == 0 ? 0 : trials, _ => 0, _ => 0, smallest);
        }

        var odds = probability / (1 - probability);
        var mode = Math.Min(trials, (long)((trials + 1.0) * probability));
        return new(mode, number => (trials - number) / (number + 1.0) * odds, number => number / (trials - number + 1.0) / odds, smallest);
    }

    /// <summary>A bound on the sum of all weights before the first and after a number that lies at the mode or above.</summary>
    internal double LeftOutAfter(long number) => _beyondFirst + BeyondWeight(number);

    /// <summary>The sum of the weights kept after a number.</summary>
    internal double SumAfter(long number) => number >= Last ? 0 : CompensatedSum.Of(_weights.AsSpan((int)(Math.Max(number + 1, First) - First)));

    private static List<double> Walk(long mode, int direction, Func<long, double> quotient, double smallest)
    {
        var weights = new List<double>();
        var weight = 1.0;
        for (var number = mode; direction > 0 || number > 0; number += direction)
        {
            weight *= quotient(number);
            if (!(weight >= smallest))
            {
                break;
            }

            weights.Add(weight);
        }

        return weights;
    }

    private double BeyondWeight(long number) => Beyond(this[number], _upward(number));

    /// <summary>The sum of a series that starts at weight · quotient and falls at least that fast, inflated for its own rounding.</summary>
    private static double Beyond(double weight, double quotient) => quotient == 0 ? 0
        : quotient < 1 ? weight * quotient / (1 - quotient) * (1 + 1e-6) : double.PositiveInfinity;
}
