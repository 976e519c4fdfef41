using System.Diagnostics;
using Stochastic.Chains.Internal;
using Stochastic.Chains.Kernels;

namespace Stochastic.Chains;

/// <summary>How the states of a chain hang together: what can be reached, what is left for good, what repeats in cycles.</summary>
/// <typeparam name="TState">The type of a state.</typeparam>
/// <remarks>
/// Reads only which moves are possible, never how likely they are. O(states + transitions) in time and memory. Immutable and safe
/// for concurrent use.
/// </remarks>
/// <example>
/// <code>
/// ChainStructure&lt;string&gt; structure = chain.Structure();
/// bool oneLongRun = structure.RecurrentClasses.Count == 1;
/// </code>
/// </example>
[DebuggerDisplay("{ToString(),nq}")]
public sealed class ChainStructure<TState>
    where TState : notnull
{
    private readonly Chain<TState> _chain;
    private readonly int[] _classOf;

    internal ChainStructure(Chain<TState> chain)
    {
        _chain = chain;
        var matrix = chain.Matrix;
        var components = matrix.FindComponents();
        var closed = matrix.OnGraph<bool[], ClosedComponents>(new ClosedComponents(components));
        var members = components.Members();
        var phases = new int[matrix.Size];
        var inCanonicalOrder = new CommunicatingClass<TState>[members.Length];
        for (var c = 0; c < members.Length; c++)
        {
            var period = matrix.OnGraph<int, CyclicLevels>(new CyclicLevels(members[c], components.ComponentOf, phases));
            inCanonicalOrder[c] = new CommunicatingClass<TState>(chain.States, members[c], closed[c], period, phases);
        }

        Classes = [.. inCanonicalOrder.OrderBy(group => group.Members[0])];
        RecurrentClasses = [.. Classes.Where(group => group.IsRecurrent)];
        CanonicalOrder = [.. RecurrentClasses.Concat(inCanonicalOrder.Where(group => !group.IsRecurrent)).SelectMany(group => group.States)];
        _classOf = new int[matrix.Size];
        for (var c = 0; c < Classes.Count; c++)
        {
            foreach (var member in Classes[c].Members)
            {
                _classOf[member] = c;
            }
        }

        TransientPositions = [.. Enumerable.Range(0, matrix.Size).Where(state => !Classes[_classOf[state]].IsRecurrent)];
        TransientStates = Array.ConvertAll(TransientPositions, state => chain.States[state]);
        AbsorbingStates = [.. RecurrentClasses.Where(group => group.IsAbsorbing).Select(group => group.States[0])];
    }

    /// <summary>Gets the communicating classes, ordered by their first state.</summary>
    public IReadOnlyList<CommunicatingClass<TState>> Classes { get; }

    /// <summary>Gets the recurrent classes, ordered by their first state; there is always at least one.</summary>
    public IReadOnlyList<CommunicatingClass<TState>> RecurrentClasses { get; }

    /// <summary>Gets the states that are left for good sooner or later, in state order.</summary>
    public IReadOnlyList<TState> TransientStates { get; }

    /// <summary>Gets the states that are never left, in state order.</summary>
    public IReadOnlyList<TState> AbsorbingStates { get; }

    /// <summary>Gets whether every state can be reached from every other.</summary>
    public bool IsIrreducible => Classes.Count == 1;

    /// <summary>Gets whether no recurrent class moves in cycles, so that the distribution after n steps settles.</summary>
    public bool IsAperiodic => RecurrentClasses.All(group => group.Period == 1);

    /// <summary>
    /// Gets the least common multiple of the periods of the recurrent classes: 1 when the distribution after n steps settles, else
    /// the length of the cycle it settles into.
    /// </summary>
    /// <exception cref="OverflowException">The classes have so many different periods that their common multiple exceeds 2⁶³ − 1.</exception>
    public long Period => RecurrentClasses.Aggregate(1L, (period, group) => Divisors.LeastCommonMultiple(period, group.Period));

    /// <summary>
    /// Gets the states in canonical order: the recurrent classes one after the other, then the transient states so that a move
    /// never leads to a class that comes later. In this order the matrix is block lower triangular.
    /// </summary>
    public IReadOnlyList<TState> CanonicalOrder { get; }

    internal int[] TransientPositions { get; }

    /// <summary>Finds the communicating class of a state.</summary>
    /// <param name="state">One of the chain's states.</param>
    /// <exception cref="UnknownStateException">The label is none of the chain's states.</exception>
    public CommunicatingClass<TState> ClassOf(TState state) => Classes[_classOf[_chain.States.Require(state)]];

    /// <summary>Tells whether a state can be reached from another in any number of steps. O(states + transitions).</summary>
    /// <param name="from">The state to start in.</param>
    /// <param name="to">The state to reach; every state reaches itself.</param>
    /// <exception cref="UnknownStateException">A label is none of the chain's states.</exception>
    public bool CanReach(TState from, TState to)
    {
        var source = _chain.States.Require(from);
        var target = _chain.States.Require(to);
        return _chain.Matrix.OnGraph<bool[], Reachability>(new Reachability([source]))[target];
    }

    /// <summary>Lists the states that can be reached from a state, itself included, in state order. O(states + transitions).</summary>
    /// <param name="from">The state to start in.</param>
    /// <exception cref="UnknownStateException">The label is none of the chain's states.</exception>
    public IReadOnlyList<TState> ReachableFrom(TState from)
    {
        var reached = _chain.Matrix.OnGraph<bool[], Reachability>(new Reachability([_chain.States.Require(from)]));
        return [.. _chain.States.Where((_, position) => reached[position])];
    }

    /// <summary>A short account of the structure, the same in every culture.</summary>
    public override string ToString() =>
        $"{Text.Count(Classes.Count, "class", "classes")}, {Text.Count(RecurrentClasses.Count)} recurrent; " +
        $"{Text.Count(TransientStates.Count, "transient state", "transient states")}; {(IsAperiodic ? "aperiodic" : "periodic")}";
}
