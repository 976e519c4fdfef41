using Stochastic.Chains.Estimation;

namespace Stochastic.Chains;

/// <summary>Counts moves between states: along paths, from logs of events, or as given numbers.</summary>
/// <remarks>States keep the order in which they are listed or first seen. No move is ever counted from one path or item to another.</remarks>
public static partial class TransitionCounts
{
    /// <summary>Counts the moves along one path: from each state to the one after it.</summary>
    /// <typeparam name="TState">The type of a state.</typeparam>
    /// <param name="path">The states of one item at successive steps; a repeated state is a stay.</param>
    /// <exception cref="InvalidChainException">The path is empty or has a null state.</exception>
    /// <example><code>TransitionCounts&lt;string&gt; days = TransitionCounts.FromPath(["dry", "dry", "wet", "dry"]);</code></example>
    public static TransitionCounts<TState> FromPath<TState>(IEnumerable<TState> path)
        where TState : notnull
    {
        ArgumentNullException.ThrowIfNull(path);
        return FromPaths<TState>([path]);
    }

    /// <summary>Counts the moves along one path between given states.</summary>
    /// <typeparam name="TState">The type of a state.</typeparam>
    /// <param name="states">All states, each once; they keep this order, and stay when the path never sees them.</param>
    /// <param name="path">The states of one item at successive steps; a repeated state is a stay.</param>
    /// <exception cref="InvalidChainException">The list or the path has faults, such as a state outside the list; all are named.</exception>
    /// <example><code>var days = TransitionCounts.FromPath(["dry", "wet", "snow"], ["dry", "dry", "wet"]);</code></example>
    public static TransitionCounts<TState> FromPath<TState>(IEnumerable<TState> states, IEnumerable<TState> path)
        where TState : notnull
    {
        ArgumentNullException.ThrowIfNull(path);
        return FromPaths(states, [path]);
    }

    /// <summary>Counts the moves along many paths, one for each item.</summary>
    /// <typeparam name="TState">The type of a state.</typeparam>
    /// <param name="paths">For each item its states at successive steps; read once, in O(steps). Empty paths are read and count nothing.</param>
    /// <exception cref="InvalidChainException">No states at all, a null path or a null state; all are named.</exception>
    /// <example>
    /// <code>
    /// var counts = TransitionCounts.FromPaths([["clean", "filled", "dirty"], ["clean", "clean", "filled"]]);
    /// </code>
    /// </example>
    public static TransitionCounts<TState> FromPaths<TState>(IEnumerable<IEnumerable<TState>> paths)
        where TState : notnull => FromPaths(paths, EqualityComparer<TState>.Default);

    /// <summary>Counts the moves along many paths, with a given equality of states.</summary>
    /// <typeparam name="TState">The type of a state.</typeparam>
    /// <param name="paths">For each item its states at successive steps; read once.</param>
    /// <param name="comparer">Decides whether two labels mean the same state; the counts and their chain keep it.</param>
    /// <exception cref="InvalidChainException">No states at all, a null path or a null state; all are named.</exception>
    /// <example><code>var counts = TransitionCounts.FromPaths(paths, StringComparer.OrdinalIgnoreCase);</code></example>
    public static TransitionCounts<TState> FromPaths<TState>(IEnumerable<IEnumerable<TState>> paths, IEqualityComparer<TState> comparer)
        where TState : notnull
    {
        ArgumentNullException.ThrowIfNull(paths);
        ArgumentNullException.ThrowIfNull(comparer);
        return CountPaths(paths, StateLookup<TState>.FirstSeen(comparer), keepsHistory: false);
    }

    /// <summary>Counts the moves along many paths between given states.</summary>
    /// <typeparam name="TState">The type of a state.</typeparam>
    /// <param name="states">
    /// All states, each once; they keep this order, and stay when no path sees them. A <see cref="StateSpace{TState}"/> brings its comparer.
    /// </param>
    /// <param name="paths">For each item its states at successive steps; read once.</param>
    /// <exception cref="InvalidChainException">The list or the paths have faults, such as a state outside the list; all are named.</exception>
    /// <example><code>var counts = TransitionCounts.FromPaths(["clean", "filled", "dirty", "lost"], paths);</code></example>
    public static TransitionCounts<TState> FromPaths<TState>(IEnumerable<TState> states, IEnumerable<IEnumerable<TState>> paths)
        where TState : notnull
    {
        ArgumentNullException.ThrowIfNull(states);
        ArgumentNullException.ThrowIfNull(paths);
        return CountPaths(paths, StateLookup<TState>.Listed(states), keepsHistory: false);
    }

    /// <summary>Counts the moves along many paths, with options.</summary>
    /// <typeparam name="TState">The type of a state.</typeparam>
    /// <param name="paths">For each item its states at successive steps; read once.</param>
    /// <param name="options">The list of states, their equality, and whether the history is kept.</param>
    /// <exception cref="InvalidChainException">The list or the paths have faults, such as a state outside the list; all are named.</exception>
    /// <example><code>var counts = TransitionCounts.FromPaths(paths, new PathOptions&lt;string&gt; { KeepsHistory = true });</code></example>
    public static TransitionCounts<TState> FromPaths<TState>(IEnumerable<IEnumerable<TState>> paths, PathOptions<TState> options)
        where TState : notnull
    {
        ArgumentNullException.ThrowIfNull(paths);
        ArgumentNullException.ThrowIfNull(options);
        var states = options switch
        {
            { States: null } => StateLookup<TState>.FirstSeen(options.Comparer ?? EqualityComparer<TState>.Default),
            { Comparer: null } => StateLookup<TState>.Listed(options.States),
            _ => StateLookup<TState>.Listed(options.States, options.Comparer),
        };
        return CountPaths(paths, states, options.KeepsHistory);
    }

    private static TransitionCounts<TState> CountPaths<TState>(IEnumerable<IEnumerable<TState>> paths, StateLookup<TState> states, bool keepsHistory)
        where TState : notnull
    {
        var counter = new PathCounter<TState>(states, keepsHistory);
        foreach (var path in paths)
        {
            counter.AddPath(path);
        }

        return counter.Count();
    }
}
