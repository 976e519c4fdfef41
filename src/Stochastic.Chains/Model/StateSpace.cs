using System.Collections;
using System.Diagnostics;
using System.Diagnostics.CodeAnalysis;
using Stochastic.Chains.Internal;

namespace Stochastic.Chains;

/// <summary>
/// The finite set of states of a chain, in the order in which they were given or first seen.
/// </summary>
/// <typeparam name="TState">The type of a state: an enum, a string, a number, a record; anything not null with equality.</typeparam>
/// <remarks>
/// Immutable and safe for concurrent use. The position of a state in this list is its position in every
/// <c>Values</c> span of a result.
/// </remarks>
/// <example>
/// <code>
/// StateSpace&lt;string&gt; stages = StateSpace.Of(["clean", "filled", "dirty"]);
/// int position = stages.IndexOf("filled");   // 1
/// </code>
/// </example>
[DebuggerDisplay("{ToString(),nq}")]
public sealed class StateSpace<TState> : IReadOnlyList<TState>
    where TState : notnull
{
    private readonly TState[] _states;
    private readonly Dictionary<TState, int> _index;

    internal StateSpace(TState[] states, Dictionary<TState, int> index)
    {
        _states = states;
        _index = index;
    }

    /// <summary>Gets the number of states.</summary>
    public int Count => _states.Length;

    /// <summary>Gets the comparer that decides whether two labels mean the same state.</summary>
    public IEqualityComparer<TState> Comparer => _index.Comparer;

    /// <summary>Gets the state at a position.</summary>
    /// <param name="index">A position from 0 to <see cref="Count"/> − 1.</param>
    /// <exception cref="ArgumentOutOfRangeException">The position is outside the list.</exception>
    public TState this[int index]
    {
        get
        {
            ArgumentOutOfRangeException.ThrowIfNegative(index);
            ArgumentOutOfRangeException.ThrowIfGreaterThanOrEqual(index, _states.Length);
            return _states[index];
        }
    }

    /// <summary>Finds the position of a state, in constant time.</summary>
    /// <param name="state">The state to find.</param>
    /// <returns>Its position, or −1 when it is not one of these states.</returns>
    public int IndexOf(TState state) => state is not null && _index.TryGetValue(state, out var position) ? position : -1;

    /// <summary>Tells whether a label is one of these states.</summary>
    /// <param name="state">The label to look for.</param>
    public bool Contains(TState state) => IndexOf(state) >= 0;

    /// <summary>Enumerates the states in their order.</summary>
    public IEnumerator<TState> GetEnumerator() => ((IEnumerable<TState>)_states).GetEnumerator();

    /// <summary>A short account of the states, the same in every culture.</summary>
    public override string ToString() => $"{Text.Count(Count, "state", "states")}: {Text.List(_states)}";

    IEnumerator IEnumerable.GetEnumerator() => _states.GetEnumerator();

    /// <summary>The position of a state that must be known.</summary>
    /// <exception cref="UnknownStateException">The label is none of these states.</exception>
    internal int Require(TState state)
    {
        var position = IndexOf(state);
        return position >= 0 ? position : throw UnknownStateException.For(state, this);
    }

    /// <summary>Whether two spaces list the same states in the same order.</summary>
    internal bool Matches([NotNullWhen(true)] StateSpace<TState>? other) =>
        ReferenceEquals(this, other) || (other is not null && _states.SequenceEqual(other._states, Comparer));
}
