namespace Stochastic.Chains.Estimation;

/// <summary>Finds the positions of states while counting: in a complete list, or adding each as it is first seen.</summary>
internal sealed class StateLookup<TState>
    where TState : notnull
{
    private readonly StateSpaceBuilder<TState> _states;
    private readonly bool _isListed;

    private StateLookup(StateSpaceBuilder<TState> states, bool isListed)
    {
        _states = states;
        _isListed = isListed;
    }

    internal int Count => _states.Count;

    internal static StateLookup<TState> FirstSeen(IEqualityComparer<TState> comparer) => new(new StateSpaceBuilder<TState>(comparer), isListed: false);

    /// <exception cref="InvalidChainException">No states, a null or a duplicate.</exception>
    internal static StateLookup<TState> Listed(IEnumerable<TState> states)
    {
        var comparer = states is StateSpace<TState> space ? space.Comparer : EqualityComparer<TState>.Default;
        return Listed(states, comparer);
    }

    /// <exception cref="InvalidChainException">No states, a null or a duplicate.</exception>
    internal static StateLookup<TState> Listed(IEnumerable<TState> states, IEqualityComparer<TState> comparer)
    {
        var faults = new FaultCollector();
        var builder = StateSpaceBuilder<TState>.FromList(states, comparer, faults);
        faults.ThrowIfAny();
        return new StateLookup<TState>(builder, isListed: true);
    }

    /// <summary>The position of a state, or −1 for one that is not in the complete list.</summary>
    internal int Locate(TState state) => _isListed ? _states.Find(state) : _states.FindOrAdd(state);

    /// <summary>The position of a state, or −1 for one that is not there; never adds it.</summary>
    internal int Find(TState state) => _states.Find(state);

    internal TState this[int position] => _states.States[position];

    internal StateSpace<TState> ToStateSpace() => _states.ToStateSpace();
}
