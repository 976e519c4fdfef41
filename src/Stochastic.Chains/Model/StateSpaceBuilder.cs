using Stochastic.Chains.Internal;

namespace Stochastic.Chains;

/// <summary>Collects states in the order in which they are first seen.</summary>
internal sealed class StateSpaceBuilder<TState>(IEqualityComparer<TState> comparer)
    where TState : notnull
{
    private readonly List<TState> _states = [];
    private readonly Dictionary<TState, int> _index = new(comparer);

    internal int Count => _states.Count;

    internal IReadOnlyList<TState> States => _states;

    /// <summary>Reads a complete list of states; nulls and duplicates become faults.</summary>
    internal static StateSpaceBuilder<TState> FromList(IEnumerable<TState> states, IEqualityComparer<TState> comparer, FaultCollector faults)
    {
        var builder = new StateSpaceBuilder<TState>(comparer);
        var position = 0;
        foreach (var state in states)
        {
            if (state is null)
            {
                faults.Add(ChainFaultKind.NullState, [], position, Messages.NullStateInList(position));
            }
            else if (builder._index.TryGetValue(state, out var first))
            {
                faults.Add(ChainFaultKind.DuplicateState, [state], position, Messages.DuplicateState(state, first, position));
            }
            else
            {
                builder.Add(state);
            }

            position++;
        }

        if (position == 0)
        {
            faults.Add(ChainFaultKind.NoStates, [], 0, Messages.NoStates);
        }

        return builder;
    }

    /// <summary>The position of a state, or −1 for one not seen yet.</summary>
    internal int Find(TState state) => _index.TryGetValue(state, out var position) ? position : -1;

    /// <summary>The position of a state, adding it when it is new.</summary>
    internal int FindOrAdd(TState state)
    {
        if (!_index.TryGetValue(state, out var position))
        {
            position = Add(state);
        }

        return position;
    }

    internal StateSpace<TState> ToStateSpace() => new([.. _states], _index);

    private int Add(TState state)
    {
        var position = _states.Count;
        _index.Add(state, position);
        _states.Add(state);
        return position;
    }
}
