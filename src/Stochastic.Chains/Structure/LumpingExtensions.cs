using Stochastic.Chains.Structure;

namespace Stochastic.Chains;

/// <summary>Questions about taking states together.</summary>
public static class LumpingExtensions
{
    private const double DefaultTolerance = 1e-12;

    /// <summary>Decides whether states can be taken together so that what is left is a Markov chain again, whatever the start.</summary>
    /// <typeparam name="TState">The type of a state.</typeparam>
    /// <typeparam name="TGroup">The type of a group.</typeparam>
    /// <param name="chain">The chain.</param>
    /// <param name="groupOf">The group of a state; called once for each.</param>
    /// <returns>The verdict with the largest difference found between two states of a group. O(transitions), and states · groups for the comparison.</returns>
    /// <remarks>
    /// They can when all states of a group move into each group with the same probability (Kemeny and Snell 1960, strong lumpability); differences up to 10⁻¹² of the
    /// larger probability count as rounding.
    /// </remarks>
    /// <example><code>bool isEnough = pool.Lumpability(state => state is "clean" or "dirty" ? "in house" : state).IsLumpable;</code></example>
    public static Lumpability<TState, TGroup> Lumpability<TState, TGroup>(this Chain<TState> chain, Func<TState, TGroup> groupOf)
        where TState : notnull
        where TGroup : notnull => Lumpability(chain, groupOf, DefaultTolerance);

    /// <summary>Decides whether states can be taken together, within a given tolerance.</summary>
    /// <typeparam name="TState">The type of a state.</typeparam>
    /// <typeparam name="TGroup">The type of a group.</typeparam>
    /// <param name="chain">The chain.</param>
    /// <param name="groupOf">The group of a state; called once for each.</param>
    /// <param name="tolerance">The largest difference of two probabilities, as a part of the larger one, that counts as the same; 0 or more and below 1.</param>
    /// <exception cref="ArgumentOutOfRangeException">The tolerance is not 0 or more and below 1.</exception>
    public static Lumpability<TState, TGroup> Lumpability<TState, TGroup>(this Chain<TState> chain, Func<TState, TGroup> groupOf, double tolerance)
        where TState : notnull
        where TGroup : notnull
    {
        ArgumentNullException.ThrowIfNull(chain);
        ArgumentNullException.ThrowIfNull(groupOf);
        ArgumentOutOfRangeException.ThrowIfNegative(tolerance);
        ArgumentOutOfRangeException.ThrowIfGreaterThanOrEqual(tolerance, 1);
        return Chains.Lumpability<TState, TGroup>.Of(chain, groupOf, tolerance);
    }

    /// <summary>Takes states together: the chain of the groups.</summary>
    /// <typeparam name="TState">The type of a state.</typeparam>
    /// <typeparam name="TGroup">The type of a group.</typeparam>
    /// <param name="chain">The chain.</param>
    /// <param name="groupOf">The group of a state; called once for each.</param>
    /// <returns>A chain over the groups, in the order in which they are first met. The unit of time is kept.</returns>
    /// <exception cref="ChainStructureException">Two states of a group move into some group with different probabilities; the message names them and the difference.</exception>
    /// <example><code>var coarse = pool.Lump(state => state is "lost" or "scrapped" ? "gone" : state);</code></example>
    public static Chain<TGroup> Lump<TState, TGroup>(this Chain<TState> chain, Func<TState, TGroup> groupOf)
        where TState : notnull
        where TGroup : notnull => Lumpability(chain, groupOf).ToChain();

    /// <summary>Splits the groups of a grouping as little as possible, so that what results can be lumped.</summary>
    /// <typeparam name="TState">The type of a state.</typeparam>
    /// <typeparam name="TGroup">The type of a group.</typeparam>
    /// <param name="chain">The chain.</param>
    /// <param name="groupOf">The group of a state: states that must not be taken together have different ones.</param>
    /// <returns>The groups, each with its states in state order, ordered by their first state.</returns>
    /// <remarks>
    /// Partition refinement: a group is split where its states move into some group with probabilities that differ by more than 10⁻¹² of the larger one, until none is. At
    /// most as many rounds as states, each O(transitions + states log states) for each group that was split.
    /// </remarks>
    /// <example><code>var groups = pool.CoarsestLumping(state => state is "lost" or "scrapped");</code></example>
    public static IReadOnlyList<IReadOnlyList<TState>> CoarsestLumping<TState, TGroup>(this Chain<TState> chain, Func<TState, TGroup> groupOf)
        where TState : notnull
        where TGroup : notnull
    {
        ArgumentNullException.ThrowIfNull(chain);
        ArgumentNullException.ThrowIfNull(groupOf);
        var blocks = new PartitionRefinement(chain.Matrix, DefaultTolerance).Refine(Grouping.Of(chain.States.Select(groupOf)).GroupOf);
        return [.. Enumerable.Range(0, chain.StateCount).GroupBy(state => blocks[state]).Select(block => block.Select(state => chain.States[state]).ToArray())];
    }
}
