using Stochastic.Chains.Confidence;

namespace Stochastic.Chains;

/// <summary>Standard errors of the built-in answers by the delta method, from counts.</summary>
/// <remarks>
/// The chain is the most likely one; unseen moves add nothing to the error, nor does a row that is taken as known. Options give the level and what is done with states never left; a prior plays no part.
/// </remarks>
public static class DeltaExtensions
{
    /// <summary>Finds the standard error of a long-run share.</summary>
    /// <typeparam name="TState">The type of a state.</typeparam>
    /// <param name="counts">The counted moves.</param>
    /// <param name="state">The state whose share is asked for.</param>
    /// <returns>The share with its standard error. O(states³).</returns>
    /// <exception cref="InvalidChainException">The counts cannot be estimated.</exception>
    /// <exception cref="ChainStructureException">The estimated chain is not irreducible.</exception>
    /// <exception cref="UnknownStateException">The label is none of the states.</exception>
    /// <example><code>DeltaConfidence share = counts.StationaryError("failed");</code></example>
    public static DeltaConfidence StationaryError<TState>(this TransitionCounts<TState> counts, TState state)
        where TState : notnull => StationaryError(counts, state, new EstimateOptions<TState>());

    /// <summary>Finds the standard error of a long-run share, with options.</summary>
    /// <typeparam name="TState">The type of a state.</typeparam>
    /// <param name="counts">The counted moves.</param>
    /// <param name="state">The state whose share is asked for.</param>
    /// <param name="options">The level of the interval, and what is done with states never left.</param>
    /// <returns>The share with its standard error. O(states³).</returns>
    /// <exception cref="InvalidChainException">The counts cannot be estimated.</exception>
    /// <exception cref="ChainStructureException">The estimated chain is not irreducible.</exception>
    /// <exception cref="UnknownStateException">The label is none of the states.</exception>
    public static DeltaConfidence StationaryError<TState>(this TransitionCounts<TState> counts, TState state, EstimateOptions<TState> options)
        where TState : notnull
    {
        var delta = DeltaVariance<TState>.Of(counts, options);
        var inverse = delta.Chain.GroupInverse();
        var shares = delta.Chain.Stationary();
        return delta.ToConfidence(shares[state], from => shares[from], to => inverse[to, state]);
    }

    /// <summary>Finds the standard error of a mean time until a target.</summary>
    /// <typeparam name="TState">The type of a state.</typeparam>
    /// <param name="counts">The counted moves.</param>
    /// <param name="from">The state it starts in.</param>
    /// <param name="target">The target.</param>
    /// <param name="options">The level of the interval, and what is done with states never left.</param>
    /// <returns>The mean number of steps with its standard error. O(states³).</returns>
    /// <exception cref="InvalidChainException">The counts cannot be estimated.</exception>
    /// <exception cref="ChainStructureException">The target may never be reached on the estimated chain, from some state.</exception>
    /// <exception cref="UnknownStateException">A label is none of the states.</exception>
    /// <example><code>DeltaConfidence weeks = counts.TimeError("clean", "lost", new EstimateOptions&lt;string&gt; { Unobserved = UnobservedStates.Absorbing });</code></example>
    public static DeltaConfidence TimeError<TState>(this TransitionCounts<TState> counts, TState from, TState target, EstimateOptions<TState> options)
        where TState : notnull
    {
        var delta = DeltaVariance<TState>.Of(counts, options);
        _ = delta.Chain.TimeDerivative(target, []); // refuses a target that may never be reached
        var times = delta.Chain.TimeTo(target);
        var visits = times.VisitsFrom(from);
        return delta.ToConfidence(times.Mean(from), row => visits[row], times.Mean);
    }

    /// <summary>Finds the standard error of a probability of ending in a closed class.</summary>
    /// <typeparam name="TState">The type of a state.</typeparam>
    /// <param name="counts">The counted moves.</param>
    /// <param name="from">The state it starts in, a transient one.</param>
    /// <param name="into">A state of the closed class.</param>
    /// <param name="options">The level of the interval, and what is done with states never left.</param>
    /// <returns>The probability with its standard error. O(states³).</returns>
    /// <exception cref="InvalidChainException">The counts cannot be estimated.</exception>
    /// <exception cref="ChainStructureException">The estimated chain has no such end.</exception>
    /// <exception cref="UnknownStateException">A label is none of the states.</exception>
    /// <example><code>DeltaConfidence lost = counts.AbsorptionError("clean", "lost", new EstimateOptions&lt;string&gt; { Unobserved = UnobservedStates.Absorbing });</code></example>
    public static DeltaConfidence AbsorptionError<TState>(this TransitionCounts<TState> counts, TState from, TState into, EstimateOptions<TState> options)
        where TState : notnull
    {
        var delta = DeltaVariance<TState>.Of(counts, options);
        var absorption = delta.Chain.Absorption();
        var visits = absorption.Steps.VisitsFrom(from);
        return delta.ToConfidence(absorption.Probability(from, into), row => visits[row], to => absorption.Probability(to, into));
    }
}
