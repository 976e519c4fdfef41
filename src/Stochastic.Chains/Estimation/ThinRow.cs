namespace Stochastic.Chains;

/// <summary>A state whose row rests on few observations.</summary>
/// <typeparam name="TState">The type of a state.</typeparam>
/// <param name="State">The state.</param>
/// <param name="Count">The number of moves out of it that were counted.</param>
/// <example><code>foreach (ThinRow&lt;string&gt; row in estimate.ThinRows) { Console.WriteLine($"{row.State}: {row.Count}"); }</code></example>
public readonly record struct ThinRow<TState>(TState State, long Count)
    where TState : notnull;
