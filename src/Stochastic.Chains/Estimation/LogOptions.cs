using Stochastic.Chains.Internal;

namespace Stochastic.Chains;

/// <summary>How a log of events is counted.</summary>
/// <typeparam name="TState">The type of a state.</typeparam>
/// <remarks>By default time only orders the events of each item, and nothing is assumed: each event that follows another of its item is one move.</remarks>
/// <example>
/// <code>
/// var options = new LogOptions&lt;string&gt;
/// {
///     Period = LogPeriod.Weeks(1, TimeZoneInfo.FindSystemTimeZoneById("Europe/Berlin")),
///     Silence = new SilenceRule&lt;string&gt;(TimeSpan.FromDays(180), "lost"),
///     FinalStates = ["scrapped"],
/// };
/// var counts = TransitionCounts.FromEvents(events, options);
/// </code>
/// </example>
public sealed record LogOptions<TState>
    where TState : notnull
{
    /// <summary>
    /// Gets all states, each once: they keep this order, stay when the log never sees them, and any other state in the log is refused.
    /// Default: none given, the states are those first seen.
    /// </summary>
    public IReadOnlyList<TState>? States { get; init; }

    /// <summary>
    /// Gets the comparer that decides whether two labels mean the same state. Default: none given, the comparer of
    /// <see cref="States"/> where they are a <see cref="StateSpace{TState}"/>, else the type's own equality.
    /// </summary>
    public IEqualityComparer<TState>? Comparer { get; init; }

    /// <summary>
    /// Gets the fixed step of the chain. Default: none, time only orders: each event after an item's first is one move, and an item
    /// seen twice in one state has stayed there for a step. With a period, each item is asked for its state at every period boundary,
    /// on the assumption that it did not change between scans; see <see cref="LogPeriod"/>.
    /// </summary>
    public LogPeriod? Period { get; init; }

    /// <summary>Gets what silence means. Default: nothing; an item that is not seen again is open when the log ends.</summary>
    public SilenceRule<TState>? Silence { get; init; }

    /// <summary>
    /// Gets the states in which an item's history is complete, such as scrapped or sold: an item last seen in one of them is finished,
    /// neither silent nor open. Counting does not stop there if it is seen again. Default: none, besides the state that silence moves to.
    /// </summary>
    /// <exception cref="ArgumentException">Set to null, or to a list with a null in it.</exception>
    public IReadOnlyList<TState> FinalStates
    {
        get;
        init
        {
            ArgumentNullException.ThrowIfNull(value);
            field = value.Any(state => state is null) ? throw new ArgumentException(Messages.NullFinalState, nameof(value)) : value;
        }
    } = [];

    /// <summary>
    /// Gets the instant up to which the log is complete: silence is measured to it, and periods that end by it are counted. Events
    /// after it are refused. Default: none given, the time of the latest event.
    /// </summary>
    public DateTimeOffset? LogEnd { get; init; }

    /// <summary>
    /// Gets whether <see cref="TransitionCounts{TState}.History"/> is counted too, which the tests of a second order and of the lengths of stays need.
    /// Takes memory for each three states seen in a row. Default: false.
    /// </summary>
    public bool KeepsHistory { get; init; }

    /// <summary>Gets where progress is reported, now and then; the fraction stays 0 while the number of events is unknown. Default: nowhere.</summary>
    public IProgress<SolveProgress>? Progress { get; init; }

    /// <summary>Gets the token that cancels the counting. Default: none.</summary>
    public CancellationToken CancellationToken { get; init; } = CancellationToken.None;
}
