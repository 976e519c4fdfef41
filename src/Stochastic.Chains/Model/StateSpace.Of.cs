namespace Stochastic.Chains;

/// <summary>Makes state spaces.</summary>
public static class StateSpace
{
    /// <summary>Lists the states of a chain, in the order given, with the type's default equality.</summary>
    /// <typeparam name="TState">The type of a state.</typeparam>
    /// <param name="states">The states, each once and none null; at least one.</param>
    /// <exception cref="InvalidChainException">No states, a null or a duplicate.</exception>
    /// <example><code>StateSpace&lt;string&gt; stages = StateSpace.Of(["clean", "filled", "dirty"]);</code></example>
    public static StateSpace<TState> Of<TState>(IEnumerable<TState> states)
        where TState : notnull => Of(states, EqualityComparer<TState>.Default);

    /// <summary>Lists the states of a chain, in the order given, with a given equality.</summary>
    /// <typeparam name="TState">The type of a state.</typeparam>
    /// <param name="states">The states, each once and none null; at least one.</param>
    /// <param name="comparer">Decides whether two labels mean the same state.</param>
    /// <exception cref="InvalidChainException">No states, a null or a duplicate.</exception>
    /// <example><code>StateSpace&lt;string&gt; stages = StateSpace.Of(["Clean", "Filled"], StringComparer.OrdinalIgnoreCase);</code></example>
    public static StateSpace<TState> Of<TState>(IEnumerable<TState> states, IEqualityComparer<TState> comparer)
        where TState : notnull
    {
        ArgumentNullException.ThrowIfNull(states);
        ArgumentNullException.ThrowIfNull(comparer);
        var faults = new FaultCollector();
        var builder = StateSpaceBuilder<TState>.FromList(states, comparer, faults);
        faults.ThrowIfAny();
        return builder.ToStateSpace();
    }
}
