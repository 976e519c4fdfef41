namespace Stochastic.Chains;

/// <summary>Questions about how the states of a chain hang together.</summary>
public static class ChainStructureExtensions
{
    /// <summary>Finds the classes, the recurrent and transient states, and the periods of a chain.</summary>
    /// <typeparam name="TState">The type of a state.</typeparam>
    /// <param name="chain">The chain.</param>
    /// <returns>The structure; computed once and kept with the chain. O(states + transitions).</returns>
    /// <example><code>IReadOnlyList&lt;string&gt; ends = chain.Structure().AbsorbingStates;</code></example>
    public static ChainStructure<TState> Structure<TState>(this Chain<TState> chain)
        where TState : notnull
    {
        ArgumentNullException.ThrowIfNull(chain);
        return chain.Derive(static chain => new ChainStructure<TState>(chain));
    }

    /// <summary>Decides whether the chain looks the same when time runs backwards, within rounding.</summary>
    /// <typeparam name="TState">The type of a state.</typeparam>
    /// <param name="chain">The chain.</param>
    /// <returns>The verdict with the largest deviation found. O(transitions).</returns>
    /// <remarks>
    /// Kolmogorov's criterion: around every cycle, the product of the probabilities is the same in both directions. Checked with
    /// potentials along a spanning tree of each recurrent class; transient states play no part. The tolerance is 10⁻¹².
    /// </remarks>
    /// <example><code>bool sameBackwards = chain.Reversibility().IsReversible;</code></example>
    public static Reversibility<TState> Reversibility<TState>(this Chain<TState> chain)
        where TState : notnull => Reversibility(chain, DefaultTolerance);

    /// <summary>Decides whether the chain looks the same when time runs backwards, within a given tolerance.</summary>
    /// <typeparam name="TState">The type of a state.</typeparam>
    /// <param name="chain">The chain.</param>
    /// <param name="tolerance">
    /// The largest relative difference of the two flows between a pair of states that counts as rounding of the given
    /// probabilities; 0 or more and below 1.
    /// </param>
    /// <returns>The verdict with the largest deviation found. O(transitions).</returns>
    /// <exception cref="ArgumentOutOfRangeException">The tolerance is not 0 or more and below 1.</exception>
    public static Reversibility<TState> Reversibility<TState>(this Chain<TState> chain, double tolerance)
        where TState : notnull
    {
        ArgumentNullException.ThrowIfNull(chain);
        ArgumentOutOfRangeException.ThrowIfNegative(tolerance);
        ArgumentOutOfRangeException.ThrowIfGreaterThanOrEqual(tolerance, 1);
        return Chains.Reversibility<TState>.Of(chain, tolerance);
    }

    private const double DefaultTolerance = 1e-12;
}
