using Stochastic.Chains.Estimation;

namespace Stochastic.Chains;

/// <summary>Estimates with standard errors and intervals from counted moves.</summary>
public static class EstimateExtensions
{
    /// <summary>Estimates the probabilities by maximum likelihood, with standard errors and 95 % intervals.</summary>
    /// <typeparam name="TState">The type of a state.</typeparam>
    /// <param name="counts">The counted moves.</param>
    /// <returns>The estimate. O(states + moves).</returns>
    /// <exception cref="InvalidChainException">States were never left; each is named.</exception>
    /// <example><code>Interval lost = counts.Estimate().Interval("at shop", "lost");</code></example>
    public static TransitionEstimate<TState> Estimate<TState>(this TransitionCounts<TState> counts)
        where TState : notnull => Estimate(counts, new EstimateOptions<TState>());

    /// <summary>Estimates the probabilities, with options: a prior opinion, moves that cannot happen, the level of the intervals.</summary>
    /// <typeparam name="TState">The type of a state.</typeparam>
    /// <param name="counts">The counted moves.</param>
    /// <param name="options">The options.</param>
    /// <returns>The estimate. O(states + moves); with a prior and unseen moves possible O(states²).</returns>
    /// <exception cref="InvalidChainException">
    /// States were never left and are to be refused, no state is left, or moves were counted that are said to be impossible; all are named.
    /// </exception>
    /// <exception cref="UnknownStateException">The options name a state that is not there.</exception>
    /// <exception cref="ArgumentOutOfRangeException">A choice of the options is none of its kind.</exception>
    /// <exception cref="MemoryLimitException">A prior over all pairs of so many states takes more than 2 GiB: choose <see cref="UnseenMoves.Impossible"/>.</exception>
    /// <example>
    /// <code>
    /// var estimate = counts.Estimate(new EstimateOptions&lt;string&gt; { Prior = DirichletPrior.Jeffreys&lt;string&gt;() });
    /// </code>
    /// </example>
    public static TransitionEstimate<TState> Estimate<TState>(this TransitionCounts<TState> counts, EstimateOptions<TState> options)
        where TState : notnull
    {
        ArgumentNullException.ThrowIfNull(counts);
        ArgumentNullException.ThrowIfNull(options);
        var (states, rows) = options.Unobserved switch
        {
            UnobservedStates.Drop => KeptCounts.Of(counts.States, counts.Rows),
            UnobservedStates.Refuse or UnobservedStates.Absorbing => (counts.States, counts.Rows),
            _ => throw new ArgumentOutOfRangeException(nameof(options), options.Unobserved, Internal.Messages.UnknownChoice),
        };
        return new TransitionEstimate<TState>(states, PossibleMoves<TState>.Find(states, rows, options), options);
    }
}
