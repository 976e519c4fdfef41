using Stochastic.Chains.Internal;

namespace Stochastic.Chains;

/// <summary>How the confidence of an answer is found.</summary>
/// <typeparam name="TState">The type of a state.</typeparam>
/// <example>
/// <code>
/// var options = new ConfidenceOptions&lt;string&gt; { Draws = 4000, Seed = 7, Parallelism = 4 };
/// </code>
/// </example>
public sealed record ConfidenceOptions<TState>
    where TState : notnull
{
    private const int UsualDraws = 1000;
    private const double UsualLevel = 0.95;

    /// <summary>Gets where the chains come from. Default: <see cref="ConfidenceMethod.PosteriorSampling"/>.</summary>
    public ConfidenceMethod Method { get; init; } = ConfidenceMethod.PosteriorSampling;

    /// <summary>
    /// Gets how the probabilities are estimated: the prior, the moves that cannot happen, what is done with states never left. Default: Jeffreys' prior, and
    /// moves that were never counted cannot happen. A missing prior is taken as Jeffreys'; the bootstrap uses none.
    /// </summary>
    /// <exception cref="ArgumentNullException">Set to null.</exception>
    public EstimateOptions<TState> Estimate
    {
        get;
        init
        {
            ArgumentNullException.ThrowIfNull(value);
            field = value;
        }
    }
    = new() { Prior = DirichletPrior.Jeffreys<TState>(), UnseenMoves = UnseenMoves.Impossible };

    /// <summary>Gets the level of the interval, above 0 and below 1. Default: 0.95.</summary>
    /// <exception cref="ArgumentOutOfRangeException">Set to a value that is not above 0 and below 1.</exception>
    public double Level
    {
        get;
        init => field = value > 0 && value < 1 ? value : throw new ArgumentOutOfRangeException(nameof(value), value, Messages.LevelOutOfRange);
    }
    = UsualLevel;

    /// <summary>Gets the number of chains drawn, 1 or more; at least 2/(1 − <see cref="Level"/>) are needed. Default: 1000.</summary>
    /// <exception cref="ArgumentOutOfRangeException">Set to less than 1.</exception>
    public int Draws
    {
        get;
        init
        {
            ArgumentOutOfRangeException.ThrowIfLessThan(value, 1);
            field = value;
        }
    }
    = UsualDraws;

    /// <summary>Gets the seed of the draws. Draw number k uses the stream number k of a <see cref="RandomNumbers"/>. Default: 1.</summary>
    public long Seed { get; init; } = 1;

    /// <summary>
    /// Gets the number of threads that ask the answer at the same time, 1 or more. The result has the same bits for any number; the answer must allow
    /// being asked by several threads at once when it is above 1. Default: 1.
    /// </summary>
    /// <exception cref="ArgumentOutOfRangeException">Set to less than 1.</exception>
    public int Parallelism
    {
        get;
        init
        {
            ArgumentOutOfRangeException.ThrowIfLessThan(value, 1);
            field = value;
        }
    }
    = 1;

    /// <summary>Gets the token that cancels the work between two draws. Default: none.</summary>
    public CancellationToken CancellationToken { get; init; } = CancellationToken.None;

    /// <summary>Gets where progress is reported, now and then. Default: nowhere.</summary>
    public IProgress<SolveProgress>? Progress { get; init; }
}
