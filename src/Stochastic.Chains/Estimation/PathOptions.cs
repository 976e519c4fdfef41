namespace Stochastic.Chains;

/// <summary>How paths are counted.</summary>
/// <typeparam name="TState">The type of a state.</typeparam>
/// <example><code>var counts = TransitionCounts.FromPaths(paths, new PathOptions&lt;string&gt; { KeepsHistory = true });</code></example>
public sealed record PathOptions<TState>
    where TState : notnull
{
    /// <summary>Gets all states in their order; any other is refused. Default: null, the states as they are first seen.</summary>
    public IReadOnlyList<TState>? States { get; init; }

    /// <summary>Gets what decides whether two labels mean the same state. Default: null, the comparer of the list of states, else the type's own equality.</summary>
    public IEqualityComparer<TState>? Comparer { get; init; }

    /// <summary>
    /// Gets whether <see cref="TransitionCounts{TState}.History"/> is counted too, which the tests of a second order and of the lengths of stays need.
    /// Takes memory for each three states seen in a row. Default: false.
    /// </summary>
    public bool KeepsHistory { get; init; }
}
