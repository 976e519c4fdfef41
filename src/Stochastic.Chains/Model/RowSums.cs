using Stochastic.Chains.Internal;

namespace Stochastic.Chains;

/// <summary>What is done with a row whose probabilities do not sum to one.</summary>
/// <remarks>
/// Rounding of decimal input is always tolerated: a sum may be off by 10⁻¹² for each transition of the row, and by no more than
/// 10⁻⁹ in all. The numbers are kept as given. Anything further off is a fault, unless rescaling is asked for here.
/// </remarks>
/// <example>
/// <code>
/// var options = new ChainOptions&lt;string&gt; { RowSums = RowSums.Rescale(0.005) };
/// var chain = Chain.FromMatrix(states, percentages, options);
/// foreach (RescaledRow&lt;string&gt; row in chain.RescaledRows) { Console.WriteLine($"{row.State} summed to {row.Sum}"); }
/// </code>
/// </example>
public sealed record RowSums
{
    private const double TolerancePerTransition = 1e-12;
    private const double LargestTolerance = 1e-9;

    private RowSums(double maxDeviation) => MaxDeviation = maxDeviation;

    /// <summary>Gets the default: rows must sum to one within rounding.</summary>
    public static RowSums MustBeOne { get; } = new(0);

    /// <summary>Gets the largest deviation from one that is rescaled; 0 where rescaling was not asked for.</summary>
    public double MaxDeviation { get; }

    /// <summary>Divides a row by its sum where the sum is off by at most a given amount, and records it on the chain.</summary>
    /// <param name="maxDeviation">The largest |sum − 1| that is rescaled, above 0 and below 1. A row of zeros never passes.</param>
    /// <exception cref="ArgumentOutOfRangeException">Not above 0 and below 1.</exception>
    public static RowSums Rescale(double maxDeviation) => maxDeviation is > 0 and < 1
        ? new RowSums(maxDeviation)
        : throw new ArgumentOutOfRangeException(nameof(maxDeviation), maxDeviation, Messages.DeviationOutOfRange);

    /// <summary>The deviation that counts as rounding in a row of a given number of transitions.</summary>
    internal static double Tolerance(int transitions) => Math.Min(LargestTolerance, TolerancePerTransition * transitions);
}
