using Stochastic.Chains.Internal;

namespace Stochastic.Chains.Estimation;

/// <summary>Counts the moves along paths, gathering every fault on the way. No move leads from one path to the next.</summary>
internal sealed class PathCounter<TState>(StateLookup<TState> states, bool keepsHistory)
    where TState : notnull
{
    private readonly MoveCounter _moves = new(keepsHistory ? new PathRecorder() : null);
    private readonly FaultCollector _faults = new();
    private long _paths;

    internal void AddPath(IEnumerable<TState>? path)
    {
        _paths++;
        if (path is null)
        {
            _faults.Add(ChainFaultKind.NullState, [], _paths, Messages.NullPath(_paths));
            return;
        }

        _moves.StartPath();
        var previous = -1;
        var step = 0L;
        foreach (var state in path)
        {
            step++;
            var position = Locate(state, step);
            if (previous >= 0 && position >= 0)
            {
                _moves.Add(previous, position);
            }

            previous = position;
        }
    }

    /// <exception cref="InvalidChainException">The paths had faults; all are listed.</exception>
    internal TransitionCounts<TState> Count()
    {
        if (states.Count == 0 && !_faults.HasFaults)
        {
            _faults.Add(ChainFaultKind.NoStates, [], 0, Messages.NoStatesInPaths);
        }

        _faults.ThrowIfAny();
        var space = states.ToStateSpace();
        return new TransitionCounts<TState>(space, _moves.ToRows(space.Count), _paths, log: null) { History = PathHistories.Of(space, _moves) };
    }

    private int Locate(TState state, long step)
    {
        if (state is null)
        {
            _faults.Add(ChainFaultKind.NullState, [], step, Messages.NullStateInPath(_paths, step));
            return -1;
        }

        var position = states.Locate(state);
        if (position < 0)
        {
            _faults.Add(ChainFaultKind.UnknownState, [state], step, Messages.UnknownStateInPath(state, _paths, step));
        }

        return position;
    }
}
