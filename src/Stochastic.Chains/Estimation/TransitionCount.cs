namespace Stochastic.Chains;

/// <summary>How often one move was counted: from a state, to a state.</summary>
/// <typeparam name="TState">The type of a state.</typeparam>
/// <param name="From">The state the move started in (the row).</param>
/// <param name="To">The state the move ended in (the column); equal to <paramref name="From"/> for a stay.</param>
/// <param name="Count">How often the move was counted, 0 or more.</param>
/// <example><code>TransitionCount&lt;string&gt; washed = new("dirty", "clean", 118);</code></example>
public readonly record struct TransitionCount<TState>(TState From, TState To, long Count)
    where TState : notnull;
