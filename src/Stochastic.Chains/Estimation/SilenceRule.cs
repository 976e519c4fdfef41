using Stochastic.Chains.Internal;

namespace Stochastic.Chains;

/// <summary>
/// What silence means in a log that never says so: an item unseen for longer than a span is taken to have moved to a named state,
/// such as lost. An assumption, so opt-in; the log's report counts the items it was applied to.
/// </summary>
/// <typeparam name="TState">The type of a state.</typeparam>
/// <remarks>
/// The rule counts one move from the last state seen to the named state, and nothing after it. It spares items last seen in the named
/// state or in one of <see cref="LogOptions{TState}.FinalStates"/>. Choose a span clearly longer than the usual time between two scans:
/// the share taken as lost depends on it directly (common practice, no source). Where periods are filled, a silent item counts as
/// staying where it was last seen until the span has passed, and an item that fell silent within the last such span of the log is not
/// known to be gone: staying is counted somewhat too often, and losses somewhat too seldom.
/// </remarks>
/// <example>
/// <code>
/// var options = new LogOptions&lt;string&gt; { Silence = new SilenceRule&lt;string&gt;(TimeSpan.FromDays(180), "lost") };
/// </code>
/// </example>
public sealed record SilenceRule<TState>
    where TState : notnull
{
    /// <summary>Makes a rule.</summary>
    /// <param name="after">The longest time unseen, up to the end of the log, that is still no silence; above zero.</param>
    /// <param name="movesTo">The state a silent item is taken to have moved to.</param>
    /// <exception cref="ArgumentOutOfRangeException">The span is not above zero.</exception>
    public SilenceRule(TimeSpan after, TState movesTo)
    {
        ArgumentNullException.ThrowIfNull(movesTo);
        After = after > TimeSpan.Zero ? after : throw new ArgumentOutOfRangeException(nameof(after), after, Messages.SilenceNotPositive);
        MovesTo = movesTo;
    }

    /// <summary>Gets the longest time unseen that is still no silence. Exactly this long is not silent; anything longer is.</summary>
    public TimeSpan After { get; }

    /// <summary>Gets the state a silent item is taken to have moved to.</summary>
    public TState MovesTo { get; }

    /// <summary>
    /// Gets whether the rule also holds for items that come back: a gap longer than <see cref="After"/> between two events is then a
    /// move to the named state and a move back. Default: false, an item that came back was never gone; the report counts such gaps
    /// either way.
    /// </summary>
    public bool CountsReturns { get; init; }
}
