using System.Collections;
using System.Diagnostics;
using System.Diagnostics.CodeAnalysis;
using Stochastic.Chains.Internal;

namespace Stochastic.Chains;

/// <summary>How long it takes until something is reached, counting only the futures in which it is reached.</summary>
/// <typeparam name="TState">The type of a state.</typeparam>
/// <remarks>
/// Times are counted in steps, or in the unit of the rates when the chain was made from rates. Immutable and safe for concurrent use.
/// </remarks>
/// <example>
/// <code>
/// ConditionalTimes&lt;string&gt; thoseLost = pool.TimeTo("lost").IfReached();
/// double weeks = thoseLost.Mean("clean");
/// </code>
/// </example>
[DebuggerDisplay("{ToString(),nq}")]
[SuppressMessage("Naming", "CA1710", Justification = "The trade's word; that it enumerates is a convenience.")]
public sealed class ConditionalTimes<TState> : ICertified, IEnumerable<KeyValuePair<TState, double>>
    where TState : notnull
{
    private readonly double[] _means;

    internal ConditionalTimes(StateSpace<TState> states, double[] means, Certificate certificate)
    {
        States = states;
        _means = means;
        Certificate = certificate;
    }

    /// <summary>Gets the states, in the order of <see cref="Values"/>.</summary>
    public StateSpace<TState> States { get; }

    /// <summary>Gets the mean times in state order; 0 inside the target, +∞ where it is never reached.</summary>
    public ReadOnlySpan<double> Values => _means;

    /// <inheritdoc/>
    public Certificate Certificate { get; }

    /// <summary>Gets the mean time over those futures in which the target is reached.</summary>
    /// <param name="from">The state to start in.</param>
    /// <returns>0 inside the target; +∞ where it is never reached.</returns>
    /// <exception cref="UnknownStateException">The label is none of the chain's states.</exception>
    public double Mean(TState from) => _means[States.Require(from)];

    /// <summary>Enumerates the states with their mean time, in state order.</summary>
    public IEnumerator<KeyValuePair<TState, double>> GetEnumerator() => States.Select((state, position) => KeyValuePair.Create(state, _means[position])).GetEnumerator();

    IEnumerator IEnumerable.GetEnumerator() => GetEnumerator();

    /// <summary>A small table of the means, the same in every culture.</summary>
    public override string ToString() => StateTable.Write(States, ["from", "mean time if reached"], position => [_means[position]]);
}
