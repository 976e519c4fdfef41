using MathNet.Numerics.Distributions;
using Stochastic.Chains.Internal;

namespace Stochastic.Chains;

/// <summary>How far an answer can be trusted by its slope: its standard error to first order, without drawing anything.</summary>
/// <remarks>
/// The variance is a sum over the rows that were observed: the squared slope of the answer along a row, times the variance of the row's estimate (delta method; Rao, Linear Statistical Inference and Its
/// Applications, 2nd ed. 1973, section 6a.2). Good where counts are many and the answer bends little; for rare moves and times of rare events use
/// <see cref="ConfidenceExtensions"/>. Immutable and safe for concurrent use.
/// </remarks>
/// <example>
/// <code>
/// DeltaConfidence share = counts.StationaryError("failed");
/// Console.WriteLine(share.Interval);
/// </code>
/// </example>
public sealed class DeltaConfidence
{
    internal DeltaConfidence(double estimate, double variance, double level)
    {
        Estimate = estimate;
        StandardError = Math.Sqrt(variance);
        var half = Normal.InvCDF(0, 1, (1 + level) / 2) * StandardError;
        Interval = new Interval(estimate - half, estimate + half, level);
    }

    /// <summary>Gets the answer on the most likely chain.</summary>
    public double Estimate { get; }

    /// <summary>Gets the standard error to first order.</summary>
    public double StandardError { get; }

    /// <summary>Gets the estimate plus and minus so many standard errors, by the normal law; it may pass the ends of what is possible.</summary>
    public Interval Interval { get; }

    /// <summary>The answer with its interval, the same in every culture.</summary>
    public override string ToString() => $"{Text.Short(Estimate)}, {Interval}, standard error {Text.Short(StandardError)}";
}
