namespace Stochastic.Chains.Estimation;

/// <summary>Makes the history of counts from what was recorded with them.</summary>
internal static class PathHistories
{
    /// <summary>Null where nothing was recorded.</summary>
    internal static PathHistory<TState>? Of<TState>(StateSpace<TState> states, MoveCounter moves)
        where TState : notnull => moves.Recorder is { } recorder ? new PathHistory<TState>(states, recorder) : null;

    /// <summary>The sum of two histories; null where one is missing, for then the sum is not known.</summary>
    internal static PathHistory<TState>? Sum<TState>(PathHistory<TState>? one, PathHistory<TState>? other)
        where TState : notnull
    {
        if (one is null || other is null)
        {
            return null;
        }

        var recorder = new PathRecorder();
        recorder.AddAll(one.Recorder);
        recorder.AddAll(other.Recorder);
        return new PathHistory<TState>(one.States, recorder);
    }
}
