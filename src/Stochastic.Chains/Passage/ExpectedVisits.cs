using System.Collections;
using System.Diagnostics;
using System.Diagnostics.CodeAnalysis;
using Stochastic.Chains.Internal;

namespace Stochastic.Chains;

/// <summary>
/// How often each state is visited on the way from one start, until a target is reached or out of reach: a row of the fundamental matrix.
/// </summary>
/// <typeparam name="TState">The type of a state.</typeparam>
/// <remarks>
/// The start counts as a visit, and so does every step in which a state is stayed in. For a chain made from rates the figures are the mean times
/// spent in each state, in the unit of the rates. Immutable and safe for concurrent use.
/// </remarks>
/// <example>
/// <code>
/// ExpectedVisits&lt;string&gt; life = pool.TimeToAny(["lost", "scrapped"]).VisitsFrom("clean");
/// double trips = life["at shop"];
/// </code>
/// </example>
[DebuggerDisplay("{ToString(),nq}")]
[SuppressMessage("Naming", "CA1710", Justification = "The trade's word; that it enumerates is a convenience.")]
public sealed class ExpectedVisits<TState> : ICertified, IEnumerable<KeyValuePair<TState, double>>
    where TState : notnull
{
    private readonly double[] _visits;

    internal ExpectedVisits(TState from, StateSpace<TState> states, double[] visits, Certificate certificate)
    {
        From = from;
        States = states;
        _visits = visits;
        Certificate = certificate;
    }

    /// <summary>Gets the state it starts in.</summary>
    public TState From { get; }

    /// <summary>Gets the states, in the order of <see cref="Values"/>.</summary>
    public StateSpace<TState> States { get; }

    /// <summary>Gets the mean numbers of visits in state order; 0 for targets and for states from which no target can be reached.</summary>
    public ReadOnlySpan<double> Values => _visits;

    /// <inheritdoc/>
    public Certificate Certificate { get; }

    /// <summary>Gets the mean number of visits to a state.</summary>
    /// <param name="state">The state that is visited.</param>
    /// <exception cref="UnknownStateException">The label is none of the chain's states.</exception>
    public double this[TState state] => _visits[States.Require(state)];

    /// <summary>Enumerates the states with their mean number of visits, in state order.</summary>
    public IEnumerator<KeyValuePair<TState, double>> GetEnumerator() => States.Select((state, position) => KeyValuePair.Create(state, _visits[position])).GetEnumerator();

    IEnumerator IEnumerable.GetEnumerator() => GetEnumerator();

    /// <summary>A small table of the visits, the same in every culture.</summary>
    public override string ToString() =>
        $"From {Text.Quoted(From)}{Environment.NewLine}{StateTable.Write(States, ["state", "visits"], position => [_visits[position]])}";
}
