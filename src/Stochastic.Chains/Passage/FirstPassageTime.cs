namespace Stochastic.Chains;

/// <summary>The mean time from one state to another.</summary>
/// <typeparam name="TState">The type of a state.</typeparam>
/// <param name="From">The state to start in.</param>
/// <param name="To">The state to reach.</param>
/// <param name="Mean">Steps, or units of time of a chain made from rates; +∞ where the state may never be reached.</param>
/// <example>
/// <code>
/// FirstPassageTime&lt;string&gt; longest = pump.MeanFirstPassage().Times().MaxBy(time => time.Mean);
/// </code>
/// </example>
public readonly record struct FirstPassageTime<TState>(TState From, TState To, double Mean)
    where TState : notnull;
