namespace Stochastic.Chains;

/// <summary>How fast the probability of one move changes: one entry of a direction in which a chain is moved.</summary>
/// <typeparam name="TState">The type of a state.</typeparam>
/// <param name="From">The state the move starts in.</param>
/// <param name="To">The state the move ends in.</param>
/// <param name="Rate">The change of its probability per unit of the change; the rates of a row sum to zero.</param>
/// <example>
/// <code>
/// // More losses at the expense of returns.
/// ProbabilityChange&lt;string&gt;[] theft = [new("at shop", "lost", 1), new("at shop", "dirty", -1)];
/// </code>
/// </example>
public readonly record struct ProbabilityChange<TState>(TState From, TState To, double Rate)
    where TState : notnull;
