using Stochastic.Chains.Internal;

namespace Stochastic.Chains;

/// <summary>How probabilities are estimated from counts.</summary>
/// <typeparam name="TState">The type of a state.</typeparam>
/// <example>
/// <code>
/// var options = new EstimateOptions&lt;string&gt; { Prior = DirichletPrior.Jeffreys&lt;string&gt;(), UnseenMoves = UnseenMoves.Impossible };
/// TransitionEstimate&lt;string&gt; estimate = counts.Estimate(options);
/// </code>
/// </example>
public sealed record EstimateOptions<TState>
    where TState : notnull
{
    private const double UsualLevel = 0.95;
    private const long UsualFewObservations = 30; // common practice, no source

    /// <summary>Gets the prior opinion. Default: null, no opinion, maximum likelihood.</summary>
    public DirichletPrior<TState>? Prior { get; init; }

    /// <summary>Gets what is made of moves that were never counted. Default: <see cref="UnseenMoves.Possible"/>.</summary>
    public UnseenMoves UnseenMoves { get; init; } = UnseenMoves.Possible;

    /// <summary>Gets single moves that cannot happen, beside those that <see cref="UnseenMoves"/> rules out. Default: none.</summary>
    /// <exception cref="ArgumentNullException">Set to null.</exception>
    public IReadOnlyList<(TState From, TState To)> ImpossibleMoves
    {
        get;
        init
        {
            ArgumentNullException.ThrowIfNull(value);
            field = value;
        }
    } = [];

    /// <summary>
    /// Gets what is done with states that were never left. Default: <see cref="UnobservedStates.Refuse"/> without a prior; with a prior
    /// such a row then rests on the prior alone, where any move out of it is possible.
    /// </summary>
    public UnobservedStates Unobserved { get; init; } = UnobservedStates.Refuse;

    /// <summary>Gets the level of the intervals, above 0 and below 1. Default: 0.95.</summary>
    /// <exception cref="ArgumentOutOfRangeException">Set to a value that is not above 0 and below 1.</exception>
    public double Level
    {
        get;
        init => field = value > 0 && value < 1 ? value : throw new ArgumentOutOfRangeException(nameof(value), value, Messages.LevelOutOfRange);
    }
    = UsualLevel;

    /// <summary>Gets the number of observations below which a row is listed as thin, 0 or more. Default: 30 (common practice, no source).</summary>
    /// <exception cref="ArgumentOutOfRangeException">Set to less than 0.</exception>
    public long FewObservations
    {
        get;
        init
        {
            ArgumentOutOfRangeException.ThrowIfNegative(value);
            field = value;
        }
    }
    = UsualFewObservations;
}
