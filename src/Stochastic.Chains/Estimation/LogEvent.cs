namespace Stochastic.Chains;

/// <summary>One line of a log: an item was in a state at a time.</summary>
/// <typeparam name="TItem">The type that identifies an item: a crate's code, a customer's number.</typeparam>
/// <typeparam name="TState">The type of a state.</typeparam>
/// <param name="Item">The item, compared by its own equality.</param>
/// <param name="Time">When it was seen in the state. Only the instant counts, not the offset in which it is written.</param>
/// <param name="State">The state it was seen in.</param>
/// <example><code>LogEvent&lt;string, string&gt; scan = new("crate 17", new DateTimeOffset(2024, 5, 6, 14, 30, 0, TimeSpan.FromHours(2)), "filled");</code></example>
public readonly record struct LogEvent<TItem, TState>(TItem Item, DateTimeOffset Time, TState State)
    where TItem : notnull
    where TState : notnull
{
    /// <summary>Gets the line of the file the event stands on, from 1; 0 for an event that comes from no file. Named in refusals.</summary>
    public long Line { get; init; }
}
