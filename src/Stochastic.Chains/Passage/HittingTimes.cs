using System.Collections;
using System.Diagnostics;
using System.Diagnostics.CodeAnalysis;
using Stochastic.Chains.Internal;
using Stochastic.Chains.Passage;

namespace Stochastic.Chains;

/// <summary>How long it takes, from each state, until one of the target states is first reached, and whether it ever is.</summary>
/// <typeparam name="TState">The type of a state.</typeparam>
/// <remarks>
/// Times are counted in steps, or in the unit of the rates when the chain was made from rates. The residual of the certificate is
/// the largest relative difference of the two sides of the equations of the first step: outflow · time = 1 + flow-weighted times of
/// the next states, and the same for the probabilities. Moments, conditional times and visits are solved for when they are first asked
/// for, with one more elimination each. Immutable and safe for concurrent use.
/// </remarks>
/// <example>
/// <code>
/// HittingTimes&lt;string&gt; untilFailed = pump.TimeTo("failed");
/// double weeks = untilFailed.Mean("new");
/// double ever = untilFailed.ReachingProbability("new");
/// </code>
/// </example>
[DebuggerDisplay("{ToString(),nq}")]
[SuppressMessage("Naming", "CA1710", Justification = "The trade's word; that it enumerates is a convenience.")]
public sealed class HittingTimes<TState> : ICertified, IEnumerable<KeyValuePair<TState, double>>
    where TState : notnull
{
    private readonly HittingQuestion<TState> _question;
    private readonly double[] _means;
    private readonly double[] _reaching;
    private readonly Lazy<PassageMoments<TState>> _moments;
    private readonly Lazy<ConditionalTimes<TState>> _ifReached;

    internal HittingTimes(
        HittingQuestion<TState> question, StateSpace<TState> states, IReadOnlyList<TState> targets, double[] means, double[] reaching, Certificate certificate)
    {
        _question = question;
        States = states;
        Targets = targets;
        _means = means;
        _reaching = reaching;
        Certificate = certificate;
        _moments = new(() => Moments(question.Options), LazyThreadSafetyMode.PublicationOnly);
        _ifReached = new(() => IfReached(question.Options), LazyThreadSafetyMode.PublicationOnly);
    }

    /// <summary>Gets the states, in the order of <see cref="Values"/>.</summary>
    public StateSpace<TState> States { get; }

    /// <summary>Gets the target states.</summary>
    public IReadOnlyList<TState> Targets { get; }

    /// <summary>Gets the mean times in state order; 0 inside the target, +∞ where the target may never be reached.</summary>
    public ReadOnlySpan<double> Values => _means;

    /// <summary>Gets the probabilities of ever reaching the target, in state order; 1 inside the target.</summary>
    public ReadOnlySpan<double> ReachingProbabilities => _reaching;

    /// <inheritdoc/>
    public Certificate Certificate { get; }

    /// <summary>Gets the mean time until the target is first reached.</summary>
    /// <param name="from">The state to start in.</param>
    /// <returns>0 inside the target; +∞ where there is a chance of never reaching it, see <see cref="ReachingProbability"/>.</returns>
    /// <exception cref="UnknownStateException">The label is none of the chain's states.</exception>
    public double Mean(TState from) => _means[States.Require(from)];

    /// <summary>Gets the probability of ever reaching the target.</summary>
    /// <param name="from">The state to start in.</param>
    /// <returns>From 0 to 1; exactly 0 or 1 where the structure says so.</returns>
    /// <exception cref="UnknownStateException">The label is none of the chain's states.</exception>
    public double ReachingProbability(TState from) => _reaching[States.Require(from)];

    /// <summary>Gets the standard deviation of the time until the target is first reached.</summary>
    /// <param name="from">The state to start in.</param>
    /// <returns>0 inside the target; +∞ where the mean is infinite.</returns>
    /// <exception cref="UnknownStateException">The label is none of the chain's states.</exception>
    /// <exception cref="MemoryLimitException">Too many states lie before the target for a direct solve.</exception>
    /// <example><code>double give = pump.TimeTo("failed").StandardDeviation("new");</code></example>
    public double StandardDeviation(TState from) => _moments.Value.StandardDeviation(from);

    /// <summary>Gets the variance of the time until the target is first reached.</summary>
    /// <param name="from">The state to start in.</param>
    /// <exception cref="UnknownStateException">The label is none of the chain's states.</exception>
    /// <exception cref="NumericalRangeException">It is larger than a double can hold; its root, <see cref="StandardDeviation"/>, is not.</exception>
    /// <exception cref="MemoryLimitException">Too many states lie before the target for a direct solve.</exception>
    public double Variance(TState from) => _moments.Value.Variance(from);

    /// <summary>Gets the variances, standard deviations and third moments from every state, with their own certificate.</summary>
    /// <exception cref="MemoryLimitException">Too many states lie before the target for a direct solve.</exception>
    /// <example><code>PassageMoments&lt;string&gt; moments = pump.TimeTo("failed").Moments();</code></example>
    public PassageMoments<TState> Moments() => _moments.Value;

    /// <summary>Computes the variances, standard deviations and third moments from every state, with options.</summary>
    /// <param name="options">Evidence, cancellation and memory.</param>
    /// <exception cref="MemoryLimitException">Too many states lie before the target for a direct solve.</exception>
    /// <exception cref="OperationCanceledException">The token of the options was cancelled.</exception>
    /// <remarks>
    /// From the equations of the variances themselves, of which every term is a square, never as the small difference of two large moments.
    /// O(n³) time for n states before the target.
    /// </remarks>
    public PassageMoments<TState> Moments(SolveOptions options)
    {
        ArgumentNullException.ThrowIfNull(options);
        return _question.Moments(_means, Certificate, options);
    }

    /// <summary>Gets the mean time over only those futures in which the target is reached.</summary>
    /// <param name="from">The state to start in.</param>
    /// <returns>The mean time where it is certain to be reached; finite where it may be; +∞ where it never is.</returns>
    /// <exception cref="UnknownStateException">The label is none of the chain's states.</exception>
    /// <exception cref="NumericalRangeException">A figure is outside what a double can hold.</exception>
    /// <exception cref="MemoryLimitException">Too many states lie before the target for a direct solve.</exception>
    /// <example><code>double weeksOfThoseLost = pool.TimeTo("lost").MeanIfReached("clean");</code></example>
    public double MeanIfReached(TState from) => _ifReached.Value.Mean(from);

    /// <summary>Gets the mean times over only those futures in which the target is reached, with their own certificate.</summary>
    /// <exception cref="NumericalRangeException">A figure is outside what a double can hold.</exception>
    /// <exception cref="MemoryLimitException">Too many states lie before the target for a direct solve.</exception>
    public ConditionalTimes<TState> IfReached() => _ifReached.Value;

    /// <summary>Computes the mean times over only those futures in which the target is reached, with options. O(n³).</summary>
    /// <param name="options">Evidence, cancellation and memory.</param>
    /// <exception cref="NumericalRangeException">A figure is outside what a double can hold.</exception>
    /// <exception cref="MemoryLimitException">Too many states lie before the target for a direct solve.</exception>
    /// <exception cref="OperationCanceledException">The token of the options was cancelled.</exception>
    public ConditionalTimes<TState> IfReached(SolveOptions options)
    {
        ArgumentNullException.ThrowIfNull(options);
        return _question.IfReached(_reaching, Certificate, options);
    }

    /// <summary>Finds how often each state is visited on the way, until the target is reached or out of reach.</summary>
    /// <param name="from">The state to start in; it counts as a visit.</param>
    /// <exception cref="UnknownStateException">The label is none of the chain's states.</exception>
    /// <exception cref="NumericalRangeException">A figure is outside what a double can hold.</exception>
    /// <exception cref="MemoryLimitException">Too many states lie before the target for a direct solve.</exception>
    /// <example><code>double washes = pool.TimeTo("lost").VisitsFrom("clean")["in wash"];</code></example>
    public ExpectedVisits<TState> VisitsFrom(TState from) => VisitsFrom(from, _question.Options);

    /// <summary>Finds how often each state is visited on the way, with options. O(n³) for n states before the target.</summary>
    /// <param name="from">The state to start in; it counts as a visit.</param>
    /// <param name="options">Evidence, cancellation and memory.</param>
    /// <exception cref="UnknownStateException">The label is none of the chain's states.</exception>
    /// <exception cref="NumericalRangeException">A figure is outside what a double can hold.</exception>
    /// <exception cref="MemoryLimitException">Too many states lie before the target for a direct solve.</exception>
    /// <exception cref="OperationCanceledException">The token of the options was cancelled.</exception>
    public ExpectedVisits<TState> VisitsFrom(TState from, SolveOptions options)
    {
        ArgumentNullException.ThrowIfNull(options);
        return _question.VisitsFrom(from, options);
    }

    /// <summary>Finds how likely it is that the target is first reached with exactly, or within, each number of steps.</summary>
    /// <param name="from">The state to start in.</param>
    /// <param name="maxSteps">The horizon, 0 or more steps.</param>
    /// <exception cref="UnknownStateException">The label is none of the chain's states.</exception>
    /// <exception cref="ArgumentOutOfRangeException">The horizon is negative.</exception>
    /// <exception cref="InvalidOperationException">The chain was made from rates, so its time is not counted in steps.</exception>
    /// <remarks>
    /// One multiplication for each step, O(transitions) each. Stops multiplying once every state shrinks by the same factor but for rounding, which is
    /// then proved to hold for all further steps.
    /// </remarks>
    /// <example><code>double withinAYear = pump.TimeTo("failed").Distribution("new", 52).CumulativeProbability(52);</code></example>
    public PassageTimeDistribution<TState> Distribution(TState from, int maxSteps) => Distribution(from, maxSteps, _question.Options);

    /// <summary>Finds how likely it is that the target is first reached with exactly, or within, each number of steps, with options.</summary>
    /// <param name="from">The state to start in.</param>
    /// <param name="maxSteps">The horizon, 0 or more steps.</param>
    /// <param name="options">Evidence, cancellation and progress.</param>
    /// <exception cref="UnknownStateException">The label is none of the chain's states.</exception>
    /// <exception cref="ArgumentOutOfRangeException">The horizon is negative.</exception>
    /// <exception cref="InvalidOperationException">The chain was made from rates, so its time is not counted in steps.</exception>
    /// <exception cref="OperationCanceledException">The token of the options was cancelled.</exception>
    public PassageTimeDistribution<TState> Distribution(TState from, int maxSteps, SolveOptions options)
    {
        ArgumentNullException.ThrowIfNull(options);
        return maxSteps >= 0
            ? _question.Distribution(from, maxSteps, options)
            : throw new ArgumentOutOfRangeException(nameof(maxSteps), maxSteps, Messages.NegativeSteps(maxSteps));
    }

    /// <summary>Finds the number of steps within which the target is reached with a given probability.</summary>
    /// <param name="from">The state to start in.</param>
    /// <param name="probability">Above 0 and below 1; 0.5 gives the median.</param>
    /// <returns>
    /// The smallest number of steps within which the target is reached with at least that probability, up to the rounding of the probabilities: among very
    /// many steps the neighbours of the smallest cannot be told from it, about 10⁻¹³ of the number. +∞ when it is not reached with that
    /// probability at all, nor with one that rounding cannot tell from that of ever reaching it, unless all that reach it do so within a few steps.
    /// </returns>
    /// <exception cref="UnknownStateException">The label is none of the chain's states.</exception>
    /// <exception cref="ArgumentOutOfRangeException">The probability is not above 0 and below 1.</exception>
    /// <exception cref="InvalidOperationException">The chain was made from rates, so its time is not counted in steps.</exception>
    /// <exception cref="MemoryLimitException">The number of steps is so large that it must be found by doubling, with tables that take too much memory.</exception>
    /// <example><code>double nineOfTenFailWithin = pump.TimeTo("failed").Quantile("new", 0.9);</code></example>
    public double Quantile(TState from, double probability) => Quantile(from, probability, _question.Options);

    /// <summary>Finds the number of steps within which the target is reached with a given probability, with options.</summary>
    /// <param name="from">The state to start in.</param>
    /// <param name="probability">Above 0 and below 1; 0.5 gives the median.</param>
    /// <param name="options">Cancellation, progress and memory.</param>
    /// <exception cref="UnknownStateException">The label is none of the chain's states.</exception>
    /// <exception cref="ArgumentOutOfRangeException">The probability is not above 0 and below 1.</exception>
    /// <exception cref="InvalidOperationException">The chain was made from rates, so its time is not counted in steps.</exception>
    /// <exception cref="MemoryLimitException">The number of steps is so large that it must be found by doubling, with tables that take too much memory.</exception>
    /// <exception cref="OperationCanceledException">The token of the options was cancelled.</exception>
    /// <remarks>
    /// Step by step where few steps do: O(transitions) each. Beyond that by doubling: tables of 1, 2, 4, … steps, O(n³) for each doubling over n states
    /// before the target, so that the number of steps may be astronomical.
    /// </remarks>
    public double Quantile(TState from, double probability, SolveOptions options)
    {
        ArgumentNullException.ThrowIfNull(options);
        return probability is > 0 and < 1
            ? _question.Quantile(from, probability, ReachingProbability(from), options)
            : throw new ArgumentOutOfRangeException(nameof(probability), probability, Messages.ProbabilityBetweenZeroAndOne(probability));
    }

    /// <summary>Enumerates the states with their mean time, in state order.</summary>
    public IEnumerator<KeyValuePair<TState, double>> GetEnumerator() => States.Select((state, position) => KeyValuePair.Create(state, _means[position])).GetEnumerator();

    IEnumerator IEnumerable.GetEnumerator() => GetEnumerator();

    /// <summary>A small table of the means and probabilities, the same in every culture.</summary>
    public override string ToString()
    {
        var table = StateTable.Write(States, ["from", "mean time", "ever reached"], position => [_means[position], _reaching[position]]);
        return $"Time to {Text.List(Targets)}{Environment.NewLine}{table}";
    }
}
