using Stochastic.Chains.Internal;

namespace Stochastic.Chains;

/// <summary>A test statistic with its p-value.</summary>
/// <param name="Value">The statistic, 0 or more.</param>
/// <param name="PValue">The probability of a value at least as large if there were nothing to find; from 0 to 1.</param>
/// <example><code>double p = counts.TestIndependence().ChiSquare.PValue;</code></example>
public readonly record struct TestStatistic(double Value, double PValue)
{
    /// <summary>The statistic and its p-value with four digits, the same in every culture.</summary>
    public override string ToString() => $"{Text.Short(Value)} (p = {Text.Short(PValue)})";
}
