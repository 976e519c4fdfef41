using Stochastic.Chains.Estimation;

namespace Stochastic.Chains;

/// <summary>What was counted along the paths beyond single moves: which three states followed each other, and how long items stayed.</summary>
/// <typeparam name="TState">The type of a state.</typeparam>
/// <remarks>
/// Counted in the same pass as the moves, on request, so that paths need not be kept or read twice. It is what the tests of a second order and of the
/// lengths of stays need. Immutable and safe for concurrent use.
/// </remarks>
/// <example>
/// <code>
/// var counts = TransitionCounts.FromPaths(paths, new PathOptions&lt;string&gt; { KeepsHistory = true });
/// long twiceAtShop = counts.History!["clean", "at shop", "at shop"];
/// </code>
/// </example>
public sealed class PathHistory<TState>
    where TState : notnull
{
    internal PathHistory(StateSpace<TState> states, PathRecorder recorder)
    {
        States = states;
        Recorder = recorder;
    }

    /// <summary>Gets the states.</summary>
    public StateSpace<TState> States { get; }

    internal PathRecorder Recorder { get; }

    /// <summary>Gets how often three states followed each other along a path.</summary>
    /// <param name="earlier">The state one step before the move.</param>
    /// <param name="from">The state the move started in.</param>
    /// <param name="to">The state the move ended in.</param>
    /// <exception cref="UnknownStateException">A label is none of the states.</exception>
    public long this[TState earlier, TState from, TState to] =>
        Recorder.Triples.GetValueOrDefault((States.Require(earlier), States.Require(from), States.Require(to)));
}
