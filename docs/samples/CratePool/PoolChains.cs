using Stochastic.Chains;

namespace CratePool;

/// <summary>The two chains that the questions are asked of, a step being a week.</summary>
/// <param name="Life">The life of one crate: what is lost or scrapped stays so.</param>
/// <param name="Refilled">The pool kept full: a week after a crate is lost or scrapped, a new one takes its place; null without a stage for new crates.</param>
/// <param name="Stages">The stages in the order of a crate's life.</param>
internal sealed record PoolChains(Chain<string> Life, Chain<string>? Refilled, StageOrder Stages)
{
    /// <summary>Estimates the weekly moves and changes the rows of the ends.</summary>
    /// <param name="counts">The moves counted in the log.</param>
    /// <param name="newStage">The stage a new crate starts in; null when it is not known.</param>
    /// <param name="ends">The stages that end a life.</param>
    internal static PoolChains Of(TransitionCounts<string> counts, string? newStage, IReadOnlyList<string> ends)
    {
        var observed = counts.ToChain(UnobservedStates.Absorbing);
        var life = WithEnds(observed, ends, end => end);
        return new PoolChains(
            life,
            newStage is null ? null : WithEnds(observed, ends, _ => newStage),
            StageOrder.Of(life, newStage ?? observed.States.Except(ends).First(), ends));
    }

    private static Chain<string> WithEnds(Chain<string> observed, IReadOnlyList<string> ends, Func<string, string> next) =>
        Chain.FromTransitions(
            observed.States,
            observed.Transitions
                .Where(move => !ends.Contains(move.From))
                .Concat(ends.Select(end => new Transition<string>(end, next(end), 1))));
}
