using System.Globalization;
using Stochastic.Chains.Internal;
using Stochastic.Chains.Kernels;

namespace Stochastic.Chains;

/// <summary>How many items stand in a state at a step: a probability for each number.</summary>
/// <remarks>
/// The absolute error bound of its certificate holds for the probability of any set of numbers, so also for <see cref="AtMost"/>; its residual is
/// |sum of the probabilities − 1|. Numbers that are less likely than 10⁻³⁰ at either end are left out. Immutable and safe for concurrent use.
/// </remarks>
/// <example>
/// <code>
/// CountDistribution clean = forecast.Count(4, "clean");
/// long surelyThere = clean.Quantile(0.05);            // with 95 % probability at least so many
/// double tooFew = clean.AtMost(399);
/// </code>
/// </example>
public sealed class CountDistribution : ICertified
{
    private readonly double[] _probabilities;
    private readonly double[] _atMost;

    internal CountDistribution(long smallest, double[] probabilities, double mean, double variance, Certificate certificate)
    {
        Smallest = smallest;
        _probabilities = probabilities;
        Mean = mean;
        StandardDeviation = Math.Sqrt(variance);
        Certificate = certificate;
        var sum = default(CompensatedSum);
        _atMost = Array.ConvertAll(probabilities, probability =>
        {
            sum.Add(probability);
            return Math.Min(1, sum.Value);
        });
    }

    /// <summary>Gets the smallest number that is not negligible, which the first of <see cref="Values"/> belongs to.</summary>
    public long Smallest { get; }

    /// <summary>Gets the largest number that is not negligible.</summary>
    public long Largest => Smallest + _probabilities.Length - 1;

    /// <summary>Gets the probabilities of the numbers from <see cref="Smallest"/> to <see cref="Largest"/>.</summary>
    public ReadOnlySpan<double> Values => _probabilities;

    /// <summary>Gets the expected number.</summary>
    public double Mean { get; }

    /// <summary>Gets the standard deviation of the number.</summary>
    public double StandardDeviation { get; }

    /// <inheritdoc/>
    public Certificate Certificate { get; }

    /// <summary>Gets the probability of exactly so many.</summary>
    /// <param name="count">Any number.</param>
    public double Probability(long count) => count >= Smallest && count <= Largest ? _probabilities[count - Smallest] : 0;

    /// <summary>Gets the probability of so many or fewer.</summary>
    /// <param name="count">Any number.</param>
    public double AtMost(long count) => count < Smallest ? 0 : count >= Largest ? 1 : _atMost[count - Smallest];

    /// <summary>Finds the smallest number that is not exceeded with at least a probability.</summary>
    /// <param name="probability">From 0 to 1: 0.05 for a number that is reached or exceeded in about 95 of 100 cases.</param>
    /// <returns>The smallest number with <see cref="AtMost"/> at least that; right unless the probability lies within the error bound of a step of AtMost.</returns>
    /// <exception cref="ArgumentOutOfRangeException">The probability is not between 0 and 1.</exception>
    public long Quantile(double probability)
    {
        if (!(probability is >= 0 and <= 1))
        {
            throw new ArgumentOutOfRangeException(nameof(probability), probability, Messages.ProbabilityOutOfUnit);
        }

        var (low, high) = (Smallest, Largest);
        while (low < high)
        {
            var middle = low + ((high - low) / 2);
            (low, high) = AtMost(middle) >= probability ? (low, middle) : (middle + 1, high);
        }

        return low;
    }

    /// <summary>One line with the mean and the middle nine tenths, the same in every culture.</summary>
    public override string ToString() => string.Create(
        CultureInfo.InvariantCulture, $"mean {Mean:G6}, standard deviation {StandardDeviation:G4}, 5 % to 95 %: {Quantile(0.05):N0} to {Quantile(0.95):N0}");
}
