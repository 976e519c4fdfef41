using Stochastic.Chains.Estimation;

namespace Stochastic.Chains;

public static partial class TransitionCounts
{
    /// <summary>Counts the moves in a log of events, held in memory or streaming from a query; time only orders.</summary>
    /// <typeparam name="TItem">The type that identifies an item.</typeparam>
    /// <typeparam name="TState">The type of a state.</typeparam>
    /// <param name="events">The events in any order: items may be interleaved and times unsorted. Read once.</param>
    /// <returns>The counts, with the account of the log in <see cref="TransitionCounts{TState}.Log"/>.</returns>
    /// <remarks>
    /// Each event that follows another of its item is one move; a second event in the same state is a stay. Events that repeat item,
    /// instant and state count once. O(events), plus sorting for items whose events come unsorted; 24 bytes an event are held.
    /// </remarks>
    /// <exception cref="EventLogException">The log is empty, or an event has faults, such as two states at one instant; all are listed.</exception>
    /// <example>
    /// <code>
    /// var counts = TransitionCounts.FromEvents(scans.Select(scan => new LogEvent&lt;int, string&gt;(scan.CrateId, scan.ScannedAt, scan.Stage)));
    /// </code>
    /// </example>
    public static TransitionCounts<TState> FromEvents<TItem, TState>(IEnumerable<LogEvent<TItem, TState>> events)
        where TItem : notnull
        where TState : notnull => FromEvents(events, new LogOptions<TState>());

    /// <summary>Counts the moves in a log of events, held in memory or streaming from a query, with options.</summary>
    /// <typeparam name="TItem">The type that identifies an item.</typeparam>
    /// <typeparam name="TState">The type of a state.</typeparam>
    /// <param name="events">The events in any order: items may be interleaved and times unsorted. Read once.</param>
    /// <param name="options">The fixed step if there is one, what silence means, the list of states.</param>
    /// <returns>The counts, with the account of the log in <see cref="TransitionCounts{TState}.Log"/>.</returns>
    /// <exception cref="EventLogException">The log is empty, or an event has faults; all are listed.</exception>
    /// <exception cref="InvalidChainException">The list of states has faults, or lacks a state that the options name.</exception>
    /// <exception cref="OperationCanceledException">The token of the options was cancelled.</exception>
    /// <example><code>var counts = TransitionCounts.FromEvents(events, new LogOptions&lt;string&gt; { Period = LogPeriod.Days(1, TimeZoneInfo.Utc) });</code></example>
    public static TransitionCounts<TState> FromEvents<TItem, TState>(IEnumerable<LogEvent<TItem, TState>> events, LogOptions<TState> options)
        where TItem : notnull
        where TState : notnull
    {
        ArgumentNullException.ThrowIfNull(events);
        ArgumentNullException.ThrowIfNull(options);
        var read = 0L;
        double FractionRead() => events.TryGetNonEnumeratedCount(out var count) && count > 0 ? (double)read / count : 0;
        var counter = new EventCounter<TItem, TState>(options, new LogFaultCollector(), FractionRead);
        foreach (var entry in events)
        {
            counter.Add(entry);
            read++;
        }

        return counter.Count();
    }

    /// <summary>Counts the moves in a log of events that streams in, such as from a database query; time only orders.</summary>
    /// <typeparam name="TItem">The type that identifies an item.</typeparam>
    /// <typeparam name="TState">The type of a state.</typeparam>
    /// <param name="events">The events in any order; read once.</param>
    /// <returns>The counts, with the account of the log in <see cref="TransitionCounts{TState}.Log"/>.</returns>
    /// <exception cref="EventLogException">The log is empty, or an event has faults; all are listed.</exception>
    /// <example><code>var counts = await TransitionCounts.FromEventsAsync(query.AsAsyncEnumerable());</code></example>
    public static Task<TransitionCounts<TState>> FromEventsAsync<TItem, TState>(IAsyncEnumerable<LogEvent<TItem, TState>> events)
        where TItem : notnull
        where TState : notnull => FromEventsAsync(events, new LogOptions<TState>(), CancellationToken.None);

    /// <summary>Counts the moves in a log of events that streams in, with options.</summary>
    /// <typeparam name="TItem">The type that identifies an item.</typeparam>
    /// <typeparam name="TState">The type of a state.</typeparam>
    /// <param name="events">The events in any order; read once.</param>
    /// <param name="options">The fixed step if there is one, what silence means, the list of states.</param>
    /// <returns>The counts, with the account of the log in <see cref="TransitionCounts{TState}.Log"/>.</returns>
    /// <exception cref="EventLogException">The log is empty, or an event has faults; all are listed.</exception>
    /// <exception cref="InvalidChainException">The list of states has faults, or lacks a state that the options name.</exception>
    /// <exception cref="OperationCanceledException">The token of the options was cancelled.</exception>
    public static Task<TransitionCounts<TState>> FromEventsAsync<TItem, TState>(IAsyncEnumerable<LogEvent<TItem, TState>> events, LogOptions<TState> options)
        where TItem : notnull
        where TState : notnull => FromEventsAsync(events, options, CancellationToken.None);

    /// <summary>Counts the moves in a log of events that streams in, with options and a token.</summary>
    /// <typeparam name="TItem">The type that identifies an item.</typeparam>
    /// <typeparam name="TState">The type of a state.</typeparam>
    /// <param name="events">The events in any order; read once.</param>
    /// <param name="options">The fixed step if there is one, what silence means, the list of states.</param>
    /// <param name="cancellationToken">Cancels the reading and the counting, beside the token of the options.</param>
    /// <returns>The counts, with the account of the log in <see cref="TransitionCounts{TState}.Log"/>.</returns>
    /// <exception cref="EventLogException">The log is empty, or an event has faults; all are listed.</exception>
    /// <exception cref="InvalidChainException">The list of states has faults, or lacks a state that the options name.</exception>
    /// <exception cref="OperationCanceledException">One of the tokens was cancelled.</exception>
    /// <example>
    /// <code>
    /// var counts = await TransitionCounts.FromEventsAsync(query.AsAsyncEnumerable(), new LogOptions&lt;string&gt;(), token);
    /// </code>
    /// </example>
    public static Task<TransitionCounts<TState>> FromEventsAsync<TItem, TState>(
        IAsyncEnumerable<LogEvent<TItem, TState>> events, LogOptions<TState> options, CancellationToken cancellationToken)
        where TItem : notnull
        where TState : notnull
    {
        ArgumentNullException.ThrowIfNull(events);
        ArgumentNullException.ThrowIfNull(options);
        return CountAsync(events, options, cancellationToken);
    }

    private static async Task<TransitionCounts<TState>> CountAsync<TItem, TState>(
        IAsyncEnumerable<LogEvent<TItem, TState>> events, LogOptions<TState> options, CancellationToken cancellationToken)
        where TItem : notnull
        where TState : notnull
    {
        using var either = CancellationTokenSource.CreateLinkedTokenSource(options.CancellationToken, cancellationToken);
        var counter = new EventCounter<TItem, TState>(
            options with { CancellationToken = either.Token }, new LogFaultCollector(), static () => 0);
        await foreach (var entry in events.WithCancellation(either.Token).ConfigureAwait(false))
        {
            counter.Add(entry);
        }

        return counter.Count();
    }
}
