using System.Diagnostics;
using Stochastic.Chains.Confidence;
using Stochastic.Chains.Internal;

namespace Stochastic.Chains;

/// <summary>How far an answer can be trusted, given that the chain was estimated from counts.</summary>
/// <remarks>
/// <para>
/// The answer was asked on many chains that the counts allow. No draw is left out: one without an answer is taken to lie below the lower end and above
/// the upper end alike, which widens the interval, and infinite answers are answers.
/// </para>
/// <para>
/// What is not in here: that the future may differ from the time of the counts, and that the states may not make a chain: see the tests of counts.
/// Immutable and safe for concurrent use.
/// </para>
/// </remarks>
/// <example>
/// <code>
/// AnswerConfidence weeks = counts.Confidence(chain => chain.TimeTo("lost").Mean("clean"));
/// Console.WriteLine($"{weeks.Estimate:F1} weeks, {weeks.Interval}");
/// </code>
/// </example>
[DebuggerDisplay("{ToString(),nq}")]
public sealed class AnswerConfidence
{
    private readonly double[] _values;

    internal AnswerConfidence(double estimate, double[] values, double level, int structurallyDifferent, string? firstRefusal)
    {
        _values = values;
        Estimate = estimate;
        StructurallyDifferentDraws = structurallyDifferent;
        FirstRefusal = firstRefusal;
        var spread = DrawSpread.Of(values, level);
        Interval = spread.Interval;
        StandardError = spread.StandardDeviation;
        Mean = spread.Mean;
        RefusedDraws = spread.Refused;
        InfiniteDraws = spread.Infinite;
        MeanError = spread.StandardDeviation / Math.Sqrt(values.Length);
        LowerError = spread.LowerError;
        UpperError = spread.UpperError;
    }

    /// <summary>Gets the answer on the estimated chain: the posterior mean, or for the bootstrap the most likely one.</summary>
    public double Estimate { get; }

    /// <summary>Gets the interval with equal tails at the level asked for. An end is infinite where too many draws had no finite answer.</summary>
    public Interval Interval { get; }

    /// <summary>Gets the standard error: the standard deviation of the draws; +∞ where a draw had no finite answer.</summary>
    public double StandardError { get; }

    /// <summary>Gets the mean of the draws; +∞ where a draw had no finite answer.</summary>
    public double Mean { get; }

    /// <summary>Gets the number of chains drawn.</summary>
    public int Draws => _values.Length;

    /// <summary>Gets the answers in the order of the draws; NaN where there was none.</summary>
    public ReadOnlySpan<double> Values => _values;

    /// <summary>Gets the number of draws whose classes, recurrence or periods differ from those of the estimated chain. They are in the interval.</summary>
    public int StructurallyDifferentDraws { get; }

    /// <summary>Gets the number of draws without an answer, such as a long run that is not single.</summary>
    public int RefusedDraws { get; }

    /// <summary>Gets the number of draws whose answer was infinite.</summary>
    public int InfiniteDraws { get; }

    /// <summary>Gets what the first draw without an answer said; null when all had one.</summary>
    public string? FirstRefusal { get; }

    /// <summary>Gets the Monte Carlo standard error of <see cref="Mean"/>: how far it is off because only so many chains were drawn.</summary>
    public double MeanError { get; }

    /// <summary>Gets the Monte Carlo standard error of the lower end of the interval; more draws make it smaller. +∞ where it cannot be told.</summary>
    public double LowerError { get; }

    /// <summary>Gets the Monte Carlo standard error of the upper end of the interval; more draws make it smaller. +∞ where it cannot be told.</summary>
    public double UpperError { get; }

    /// <summary>The answer with its interval, the same in every culture.</summary>
    public override string ToString()
    {
        var text = $"{Text.Short(Estimate)}, {Interval}, standard error {Text.Short(StandardError)}, {Text.Count(Draws, "draw", "draws")}";
        return StructurallyDifferentDraws + RefusedDraws == 0
            ? text
            : $"{text}, of these {Text.Count(StructurallyDifferentDraws)} of another structure and {Text.Count(RefusedDraws)} without an answer";
    }
}
