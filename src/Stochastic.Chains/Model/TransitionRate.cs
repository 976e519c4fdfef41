namespace Stochastic.Chains;

/// <summary>One possible move in continuous time: from a state, to another state, with its rate.</summary>
/// <typeparam name="TState">The type of a state.</typeparam>
/// <param name="From">The state the move starts in.</param>
/// <param name="To">The state the move ends in; never equal to <paramref name="From"/>.</param>
/// <param name="Rate">Moves per unit of time, 0 or more, for as long as the item is in <paramref name="From"/>.</param>
/// <example><code>TransitionRate&lt;string&gt; failure = new("running", "failed", 1e-4);   // per hour</code></example>
public readonly record struct TransitionRate<TState>(TState From, TState To, double Rate)
    where TState : notnull;
