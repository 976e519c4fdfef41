using System.Collections.ObjectModel;
using System.Diagnostics;

namespace Stochastic.Chains;

/// <summary>The account of a log that was counted: how much was read, what was left aside, and what was assumed.</summary>
/// <typeparam name="TState">The type of a state.</typeparam>
/// <remarks>
/// Every item is in exactly one of <see cref="OpenItems"/>, <see cref="SilentItems"/> and <see cref="FinishedItems"/>. An open item is
/// censored: what it does next is not known, so it counts for the moves it was seen to make and for nothing after them.
/// </remarks>
/// <example>
/// <code>
/// TransitionCounts&lt;string&gt; counts = EventLog.CountCsv("scans.csv", columns, options);
/// Console.WriteLine(counts.Log);   // the whole account, with the assumptions in words
/// long stillOut = counts.Log!.OpenItemsByState["with customer"];
/// </code>
/// </example>
[DebuggerDisplay("{Events} events of {Items} items, {Moves} moves")]
public sealed record LogReport<TState>
    where TState : notnull
{
    internal LogReport()
    {
    }

    /// <summary>Gets the number of events read, duplicates included.</summary>
    public long Events { get; internal init; }

    /// <summary>Gets the number of items.</summary>
    public long Items { get; internal init; }

    /// <summary>Gets the time of the earliest event.</summary>
    public DateTimeOffset FirstTime { get; internal init; }

    /// <summary>Gets the time of the latest event.</summary>
    public DateTimeOffset LastTime { get; internal init; }

    /// <summary>Gets the instant up to which the log was taken as complete: the one given, or the time of the latest event.</summary>
    public DateTimeOffset LogEnd { get; internal init; }

    /// <summary>Gets the number of moves counted, stays and moves by silence included.</summary>
    public long Moves { get; internal init; }

    /// <summary>Gets the number of events that repeat another of the same item, instant and state; such events count once.</summary>
    public long DuplicateEvents { get; internal init; }

    /// <summary>Gets the number of items with a single event: they are in the log, but were not seen to move.</summary>
    public long SingleEventItems { get; internal init; }

    /// <summary>Gets the number of items that are open when the log ends: censored, counted for what they were seen to do.</summary>
    public long OpenItems { get; internal init; }

    /// <summary>Gets the number of open items by the state they were last seen in; states without any are left out.</summary>
    public IReadOnlyDictionary<TState, long> OpenItemsByState { get; internal init; } = ReadOnlyDictionary<TState, long>.Empty;

    /// <summary>Gets the number of items that silence moved to its named state at the end of their history.</summary>
    public long SilentItems { get; internal init; }

    /// <summary>Gets the number of items last seen in a final state, or in the state that silence moves to.</summary>
    public long FinishedItems { get; internal init; }

    /// <summary>
    /// Gets the number of gaps longer than the span of silence after which the item was seen again. Many of them say that the span is too short.
    /// </summary>
    public long ReturnsAfterSilence { get; internal init; }

    /// <summary>Gets the number of period boundaries at which the state was assumed unchanged, without an event since the one before.</summary>
    public long FilledPeriods { get; internal init; }

    /// <summary>Gets the number of events whose state was replaced before the next period boundary, so that it was passed over.</summary>
    public long PassedOverEvents { get; internal init; }

    /// <summary>Gets the number of events after the last period boundary of the log; they count at none.</summary>
    public long UnfinishedPeriodEvents { get; internal init; }

    /// <summary>Gets what the counts assume, in sentences; empty when time only orders and silence means nothing.</summary>
    public IReadOnlyList<string> Assumptions { get; internal init; } = [];

    /// <summary>The account in lines of text, the same in every culture.</summary>
    public override string ToString() => Estimation.LogReportText.Write(this);
}
