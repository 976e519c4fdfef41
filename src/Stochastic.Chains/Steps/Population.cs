using System.Collections.Immutable;
using Stochastic.Chains.Internal;
using Stochastic.Chains.Steps;

namespace Stochastic.Chains;

/// <summary>A number of items, each of which moves through the same chain independently of the others; some may join, some may leave.</summary>
/// <typeparam name="TState">The type of a state.</typeparam>
/// <remarks>
/// From one step to the next, items first leave with the loss probability of their state, those that stay make a step of the chain, and then the
/// recruits of the step join, so that they make their first move in the next one (Bartholomew, Forbes and McClean 1991). Immutable and safe for
/// concurrent use: each With… method returns a new population.
/// </remarks>
/// <example>
/// <code>
/// Population&lt;string&gt; crates = pool.StartingWith(("clean", 1200), ("dirty", 310))
///     .WithRecruitment(("clean", 15))        // bought every week
///     .WithLosses(("at shop", 0.002));       // never seen again
/// PopulationForecast&lt;string&gt; quarter = crates.Forecast(13);
/// </code>
/// </example>
public sealed class Population<TState>
    where TState : notnull
{
    /// <summary>Above it, numbers of items are no longer exact as doubles.</summary>
    private const long MostItems = 1L << 53;

    private readonly long[] _counts;
    private readonly long[] _recruitment;
    private readonly ImmutableDictionary<long, long[]> _recruitmentIn;
    private readonly double[] _losses;

    private Population(Chain<TState> chain, long[] counts, long[] recruitment, ImmutableDictionary<long, long[]> recruitmentIn, double[] losses)
    {
        Chain = chain;
        _counts = counts;
        _recruitment = recruitment;
        _recruitmentIn = recruitmentIn;
        _losses = losses;
    }

    /// <summary>Gets the chain that each item moves through.</summary>
    public Chain<TState> Chain { get; }

    /// <summary>Gets the number of items at the start, all states together.</summary>
    public long Total => _counts.Sum();

    internal ReadOnlySpan<double> Losses => _losses;

    /// <summary>Gets the number of items that start in a state.</summary>
    /// <param name="state">One of the states.</param>
    /// <exception cref="UnknownStateException">The label is none of the chain's states.</exception>
    public long Count(TState state) => _counts[Chain.States.Require(state)];

    /// <summary>Lets so many items join in every step, in place of what was said about every step before.</summary>
    /// <param name="recruits">States with how many items join there in each step, each state at most once.</param>
    /// <exception cref="ArgumentException">A number is negative or too large, or a state is repeated.</exception>
    /// <exception cref="UnknownStateException">A label is none of the chain's states.</exception>
    public Population<TState> WithRecruitment(params IEnumerable<(TState State, long Count)> recruits) =>
        new(Chain, _counts, Collect(Chain, recruits, nameof(recruits)), _recruitmentIn, _losses);

    /// <summary>Lets items join in one step, beside those that join in every step and in place of what was said about that step before.</summary>
    /// <param name="step">The step, counted from 1, at the end of which they join.</param>
    /// <param name="recruits">States with how many items join there, each state at most once.</param>
    /// <exception cref="ArgumentException">A number is negative or too large, or a state is repeated.</exception>
    /// <exception cref="ArgumentOutOfRangeException">The step is less than 1.</exception>
    /// <exception cref="UnknownStateException">A label is none of the chain's states.</exception>
    public Population<TState> WithRecruitmentIn(long step, params IEnumerable<(TState State, long Count)> recruits) => step >= 1
        ? new(Chain, _counts, _recruitment, _recruitmentIn.SetItem(step, Collect(Chain, recruits, nameof(recruits))), _losses)
        : throw new ArgumentOutOfRangeException(nameof(step), step, Messages.RecruitmentStepNotValid(step));

    /// <summary>Lets items leave for good, in place of what was said about losses before.</summary>
    /// <param name="losses">States with the probability that an item there leaves in a step instead of moving, from 0 to 1, each state at most once.</param>
    /// <exception cref="ArgumentException">A probability is not between 0 and 1, or a state is repeated.</exception>
    /// <exception cref="UnknownStateException">A label is none of the chain's states.</exception>
    public Population<TState> WithLosses(params IEnumerable<(TState State, double Probability)> losses)
    {
        ArgumentNullException.ThrowIfNull(losses);
        var values = new double[Chain.StateCount];
        var given = new HashSet<int>();
        foreach (var (state, probability) in losses)
        {
            var position = Chain.States.Require(state);
            values[position] = probability is >= 0 and <= 1 ? probability : throw new ArgumentException(Messages.LossNotValid(state, probability), nameof(losses));
            _ = given.Add(position) ? true : throw new ArgumentException(Messages.RepeatedState(state), nameof(losses));
        }

        return new(Chain, _counts, _recruitment, _recruitmentIn, values);
    }

    /// <summary>Finds how many items to expect in each state at every step up to a horizon.</summary>
    /// <param name="horizon">The last step, 0 or more.</param>
    /// <exception cref="ArgumentOutOfRangeException">The horizon is negative.</exception>
    /// <exception cref="MemoryLimitException">The forecast takes more memory than allowed.</exception>
    /// <remarks>O(transitions) a step.</remarks>
    /// <example><code>double clean = crates.Forecast(13).Expected(13, "clean");</code></example>
    public PopulationForecast<TState> Forecast(int horizon) => Forecast(horizon, new SolveOptions());

    /// <summary>Finds how many items to expect in each state at every step up to a horizon, with options.</summary>
    /// <param name="horizon">The last step, 0 or more.</param>
    /// <param name="options">Evidence, cancellation, progress and memory.</param>
    /// <exception cref="ArgumentOutOfRangeException">The horizon is negative.</exception>
    /// <exception cref="MemoryLimitException">The forecast takes more memory than allowed.</exception>
    /// <exception cref="OperationCanceledException">The token of the options was cancelled.</exception>
    public PopulationForecast<TState> Forecast(int horizon, SolveOptions options)
    {
        ArgumentNullException.ThrowIfNull(options);
        return horizon >= 0
            ? PopulationSolve<TState>.Run(this, Enumerable.Repeat(Chain, horizon), options)
            : throw new ArgumentOutOfRangeException(nameof(horizon), horizon, Messages.NegativeSteps(horizon));
    }

    /// <summary>Finds how many items to expect at every step while each step is made with a chain of its own, as when probabilities change with the season.</summary>
    /// <param name="periods">The chain of each period, all over the states of the population, in the same order.</param>
    /// <exception cref="ArgumentException">A chain is null or over other states; the message names the state.</exception>
    /// <exception cref="MemoryLimitException">The forecast takes more memory than allowed.</exception>
    public PopulationForecast<TState> ForecastThrough(IEnumerable<Chain<TState>> periods) => ForecastThrough(periods, new SolveOptions());

    /// <summary>Finds how many items to expect at every step while each step is made with a chain of its own, with options.</summary>
    /// <param name="periods">The chain of each period, all over the states of the population, in the same order.</param>
    /// <param name="options">Evidence, cancellation, progress and memory.</param>
    /// <exception cref="ArgumentException">A chain is null or over other states; the message names the state.</exception>
    /// <exception cref="MemoryLimitException">The forecast takes more memory than allowed.</exception>
    /// <exception cref="OperationCanceledException">The token of the options was cancelled.</exception>
    public PopulationForecast<TState> ForecastThrough(IEnumerable<Chain<TState>> periods, SolveOptions options)
    {
        ArgumentNullException.ThrowIfNull(periods);
        ArgumentNullException.ThrowIfNull(options);
        return PopulationSolve<TState>.Run(this, periods, options);
    }

    /// <summary>A short account of the population, the same in every culture.</summary>
    public override string ToString() => $"{Text.Count(Total, "item", "items")} in {Text.Count(Chain.StateCount, "state", "states")}";

    internal static Population<TState> Of(Chain<TState> chain, IEnumerable<(TState State, long Count)> counts, string parameter) =>
        new(chain, Collect(chain, counts, parameter), new long[chain.StateCount], ImmutableDictionary<long, long[]>.Empty, new double[chain.StateCount]);

    /// <summary>How many items enter a state at the end of a step; at step 0 those that are there at the start.</summary>
    internal long Entering(long step, int state) => step == 0
        ? _counts[state]
        : _recruitment[state] + (_recruitmentIn.TryGetValue(step, out var more) ? more[state] : 0);

    private static long[] Collect(Chain<TState> chain, IEnumerable<(TState State, long Count)> counts, string parameter)
    {
        ArgumentNullException.ThrowIfNull(counts, parameter);
        var values = new long[chain.StateCount];
        var given = new HashSet<int>();
        var total = 0L;
        foreach (var (state, count) in counts)
        {
            var position = chain.States.Require(state);
            if (count < 0 || count > MostItems - total)
            {
                throw new ArgumentException(Messages.CountNotValid(state, count, MostItems), parameter);
            }

            _ = given.Add(position) ? true : throw new ArgumentException(Messages.RepeatedState(state), parameter);
            total += count;
            values[position] = count;
        }

        return values;
    }
}
