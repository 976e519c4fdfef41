using Stochastic.Chains.Confidence;
using Stochastic.Chains.Internal;

namespace Stochastic.Chains;

/// <summary>How far answers can be trusted, given that the chain was estimated from counts.</summary>
public static class ConfidenceExtensions
{
    /// <summary>Finds how far any answer can be trusted: asks it on 1000 chains drawn from the posterior with Jeffreys' prior.</summary>
    /// <typeparam name="TState">The type of a state.</typeparam>
    /// <param name="counts">The counted moves. Moves that were never counted are taken as impossible.</param>
    /// <param name="answer">Any question to a chain that is answered with a number; it may be infinite, and may be refused by an exception of this library.</param>
    /// <returns>The answer with its 95 % interval, standard error and Monte Carlo errors; the same bits at every call.</returns>
    /// <exception cref="InvalidChainException">States were never left; each is named.</exception>
    /// <exception cref="ChainStructureException">The estimated chain itself has no such answer.</exception>
    /// <example>
    /// <code>
    /// AnswerConfidence weeks = counts.Confidence(chain => chain.TimeTo("lost").Mean("clean"));
    /// </code>
    /// </example>
    public static AnswerConfidence Confidence<TState>(this TransitionCounts<TState> counts, Func<Chain<TState>, double> answer)
        where TState : notnull => Confidence(counts, answer, new ConfidenceOptions<TState>());

    /// <summary>Finds how far any answer can be trusted, with options.</summary>
    /// <typeparam name="TState">The type of a state.</typeparam>
    /// <param name="counts">The counted moves.</param>
    /// <param name="answer">Any question to a chain that is answered with a number; it may be infinite, and may be refused by an exception of this library.</param>
    /// <param name="options">The method, the estimate, the level, the number of draws, the seed.</param>
    /// <returns>The answer with its interval, standard error and Monte Carlo errors; the same bits for the same seed and any parallelism.</returns>
    /// <exception cref="InvalidChainException">The counts cannot be estimated; see <see cref="EstimateExtensions"/>.</exception>
    /// <exception cref="ChainStructureException">The estimated chain itself has no such answer.</exception>
    /// <exception cref="ArgumentException">There are too few draws for the level.</exception>
    /// <exception cref="OperationCanceledException">The token of the options was cancelled.</exception>
    /// <example>
    /// <code>
    /// var lost = counts.Confidence(chain => chain.Absorption().Probability("clean", "lost"), new ConfidenceOptions&lt;string&gt; { Draws = 4000 });
    /// </code>
    /// </example>
    public static AnswerConfidence Confidence<TState>(
        this TransitionCounts<TState> counts, Func<Chain<TState>, double> answer, ConfidenceOptions<TState> options)
        where TState : notnull
    {
        ArgumentNullException.ThrowIfNull(answer);
        return ConfidenceOfAll(counts, chain => [answer(chain)], options)[0];
    }

    /// <summary>Finds how far several answers can be trusted, asked together on the same chains.</summary>
    /// <typeparam name="TState">The type of a state.</typeparam>
    /// <param name="counts">The counted moves.</param>
    /// <param name="answers">Questions to a chain, answered with as many numbers at every call.</param>
    /// <param name="options">The method, the estimate, the level, the number of draws, the seed.</param>
    /// <returns>Each answer with its interval. A draw that is refused has none of the answers.</returns>
    /// <exception cref="InvalidChainException">The counts cannot be estimated; see <see cref="EstimateExtensions"/>.</exception>
    /// <exception cref="ChainStructureException">The estimated chain itself has no such answers.</exception>
    /// <exception cref="ArgumentException">There are too few draws for the level.</exception>
    /// <exception cref="InvalidOperationException">The number of answers differs from one call to another.</exception>
    /// <exception cref="OperationCanceledException">The token of the options was cancelled.</exception>
    /// <example>
    /// <code>
    /// var shares = counts.ConfidenceOfAll(chain => chain.Stationary().ToArray(), new ConfidenceOptions&lt;string&gt;());
    /// </code>
    /// </example>
    public static IReadOnlyList<AnswerConfidence> ConfidenceOfAll<TState>(
        this TransitionCounts<TState> counts, Func<Chain<TState>, IReadOnlyList<double>> answers, ConfidenceOptions<TState> options)
        where TState : notnull
    {
        ArgumentNullException.ThrowIfNull(counts);
        ArgumentNullException.ThrowIfNull(answers);
        ArgumentNullException.ThrowIfNull(options);
        var isPosterior = options.Method switch
        {
            ConfidenceMethod.PosteriorSampling => true,
            ConfidenceMethod.ParametricBootstrap => false,
            _ => throw new ArgumentOutOfRangeException(nameof(options), options.Method, Messages.UnknownConfidenceMethod),
        };
        if (DrawSpread.LowerRank(options.Draws, (1 - options.Level) / 2) < 0)
        {
            throw new ArgumentException(Messages.TooFewDraws(options.Draws, options.Level), nameof(options));
        }

        var estimate = counts.Estimate(options.Estimate with { Prior = isPosterior ? options.Estimate.Prior ?? DirichletPrior.Jeffreys<TState>() : null });
        return new AnswerSampling<TState>(estimate, answers, options).Run();
    }
}
