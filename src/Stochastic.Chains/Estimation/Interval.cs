using System.Globalization;

namespace Stochastic.Chains;

/// <summary>From where to where a figure lies, with some confidence.</summary>
/// <param name="Lower">The lower end; may be −∞.</param>
/// <param name="Upper">The upper end; may be +∞.</param>
/// <param name="Level">The confidence, or for a posterior the probability, that the figure lies between them, above 0 and below 1.</param>
/// <example><code>Interval lost = counts.Estimate().Interval("at shop", "lost");   // lost.Lower, lost.Upper</code></example>
public readonly record struct Interval(double Lower, double Upper, double Level)
{
    /// <summary>Gets the distance between the ends.</summary>
    public double Width => Upper - Lower;

    /// <summary>Tells whether a value lies in the interval, its ends included.</summary>
    /// <param name="value">Any number.</param>
    public bool Contains(double value) => value >= Lower && value <= Upper;

    /// <summary>The interval with four digits, the same in every culture.</summary>
    public override string ToString() => string.Create(CultureInfo.InvariantCulture, $"{Lower:G4} to {Upper:G4} ({Level:P0})");
}
