using System.Diagnostics;
using Stochastic.Chains.Internal;

namespace Stochastic.Chains;

/// <summary>A communicating class: a largest set of states that can all be reached from each other.</summary>
/// <typeparam name="TState">The type of a state.</typeparam>
/// <remarks>Immutable and safe for concurrent use.</remarks>
/// <example>
/// <code>
/// foreach (CommunicatingClass&lt;string&gt; group in chain.Structure().Classes)
/// {
///     Console.WriteLine($"{string.Join(", ", group.States)}: {(group.IsRecurrent ? "never left" : "left for good")}");
/// }
/// </code>
/// </example>
[DebuggerDisplay("{ToString(),nq}")]
public sealed class CommunicatingClass<TState>
    where TState : notnull
{
    internal CommunicatingClass(StateSpace<TState> states, int[] members, bool isClosed, int period, int[] phases)
    {
        Members = members;
        States = Array.ConvertAll(members, member => states[member]);
        IsRecurrent = isClosed;
        Period = period;
        CyclicClasses = period <= 1
            ? [States]
            : [.. members.GroupBy(member => phases[member]).OrderBy(group => group.Key).Select(group => group.Select(member => states[member]).ToArray())];
    }

    /// <summary>Gets the states of the class, in state order.</summary>
    public IReadOnlyList<TState> States { get; }

    /// <summary>
    /// Gets whether the class is recurrent: once entered it is never left, and each of its states is returned to for ever. In a
    /// finite chain these are the closed classes; the states of all other classes are transient.
    /// </summary>
    public bool IsRecurrent { get; }

    /// <summary>Gets whether the class is a single state that is never left.</summary>
    public bool IsAbsorbing => IsRecurrent && Members.Length == 1;

    /// <summary>
    /// Gets the period: the greatest common divisor of the lengths of all ways back. 1 for an aperiodic class, 0 when there is no
    /// way back to the state at all.
    /// </summary>
    public int Period { get; }

    /// <summary>
    /// Gets the cyclic classes: each step leads from one to the next and from the last to the first, which holds the class's first
    /// state. As many as the period; one when the class is aperiodic or has no way back.
    /// </summary>
    public IReadOnlyList<IReadOnlyList<TState>> CyclicClasses { get; }

    internal int[] Members { get; }

    /// <summary>A short account of the class, the same in every culture.</summary>
    public override string ToString()
    {
        var kind = IsAbsorbing ? "absorbing" : IsRecurrent ? "recurrent" : "transient";
        var period = Period > 1 ? $", period {Text.Count(Period)}" : string.Empty;
        return $"{kind}{period}: {Text.List(States)}";
    }
}
