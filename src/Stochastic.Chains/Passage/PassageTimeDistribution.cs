using System.Diagnostics;
using System.Globalization;
using Stochastic.Chains.Internal;

namespace Stochastic.Chains;

/// <summary>How likely it is that a target is first reached with each number of steps, up to a horizon.</summary>
/// <typeparam name="TState">The type of a state.</typeparam>
/// <remarks>
/// Immutable and safe for concurrent use. The residual of the certificate is |arrived + on the way + out of reach − 1| at the horizon.
/// </remarks>
/// <example>
/// <code>
/// PassageTimeDistribution&lt;string&gt; untilFailed = pump.TimeTo("failed").Distribution("new", maxSteps: 104);
/// double withinAYear = untilFailed.CumulativeProbability(52);
/// </code>
/// </example>
[DebuggerDisplay("{ToString(),nq}")]
public sealed class PassageTimeDistribution<TState> : ICertified
    where TState : notnull
{
    private const int LargestTable = 24;

    private readonly double[] _probabilities;
    private readonly double[] _cumulative;
    private readonly double[] _survival;

    internal PassageTimeDistribution(TState from, StateSpace<TState> states, double[] probabilities, double[] cumulative, double[] survival, Certificate certificate)
    {
        From = from;
        States = states;
        Certificate = certificate;
        _probabilities = probabilities;
        _cumulative = cumulative;
        _survival = survival;
    }

    /// <summary>Gets the state it starts in.</summary>
    public TState From { get; }

    /// <summary>Gets the states of the chain.</summary>
    public StateSpace<TState> States { get; }

    /// <summary>Gets the largest number of steps looked at.</summary>
    public int MaxSteps => _probabilities.Length - 1;

    /// <summary>Gets the probabilities of arriving with exactly 0, 1, 2, … steps.</summary>
    public ReadOnlySpan<double> Values => _probabilities;

    /// <inheritdoc/>
    public Certificate Certificate { get; }

    /// <summary>Gets the probability of arriving with exactly so many steps.</summary>
    /// <param name="steps">From 0 to <see cref="MaxSteps"/>.</param>
    /// <exception cref="ArgumentOutOfRangeException">The number of steps is negative or beyond the horizon.</exception>
    public double Probability(int steps) => _probabilities[InHorizon(steps)];

    /// <summary>Gets the probability of having arrived within so many steps.</summary>
    /// <param name="steps">From 0 to <see cref="MaxSteps"/>.</param>
    /// <exception cref="ArgumentOutOfRangeException">The number of steps is negative or beyond the horizon.</exception>
    public double CumulativeProbability(int steps) => _cumulative[InHorizon(steps)];

    /// <summary>Gets the probability of not having arrived within so many steps. Added up by itself, so it keeps its digits when it is tiny.</summary>
    /// <param name="steps">From 0 to <see cref="MaxSteps"/>.</param>
    /// <exception cref="ArgumentOutOfRangeException">The number of steps is negative or beyond the horizon.</exception>
    public double SurvivalProbability(int steps) => _survival[InHorizon(steps)];

    /// <summary>A small table of the first steps, the same in every culture.</summary>
    public override string ToString()
    {
        var table = new TextTable(["steps", "exactly then", "by then"]);
        for (var steps = 0; steps <= Math.Min(MaxSteps, LargestTable - 1); steps++)
        {
            table.AddRow([Text.Count(steps), Probability(steps).ToString("G6", CultureInfo.InvariantCulture), CumulativeProbability(steps).ToString("G6", CultureInfo.InvariantCulture)]);
        }

        var rest = MaxSteps + 1 - LargestTable;
        var end = rest > 0 ? $"{Environment.NewLine}… and up to {Text.Count(MaxSteps)} steps" : string.Empty;
        return $"From {Text.Quoted(From)}{Environment.NewLine}{table}{end}";
    }

    private int InHorizon(int steps) => steps >= 0 && steps <= MaxSteps
        ? steps
        : throw new ArgumentOutOfRangeException(nameof(steps), steps, Messages.BeyondHorizon(steps, MaxSteps));
}
