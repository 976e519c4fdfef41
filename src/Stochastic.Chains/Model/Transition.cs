namespace Stochastic.Chains;

/// <summary>One possible move of a chain: from a state, to a state, with its probability per step.</summary>
/// <typeparam name="TState">The type of a state.</typeparam>
/// <param name="From">The state the move starts in (the row).</param>
/// <param name="To">The state the move ends in (the column); equal to <paramref name="From"/> for a stay.</param>
/// <param name="Probability">The probability of the move in one step, from 0 to 1.</param>
/// <example><code>Transition&lt;string&gt; wash = new("dirty", "in wash", 0.35);</code></example>
public readonly record struct Transition<TState>(TState From, TState To, double Probability)
    where TState : notnull;
