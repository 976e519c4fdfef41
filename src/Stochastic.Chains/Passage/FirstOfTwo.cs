using System.Collections;
using System.Diagnostics;
using System.Diagnostics.CodeAnalysis;
using Stochastic.Chains.Internal;

namespace Stochastic.Chains;

/// <summary>Which of two things happens first, from every state to start in.</summary>
/// <typeparam name="TState">The type of a state.</typeparam>
/// <remarks>Immutable and safe for concurrent use.</remarks>
/// <example>
/// <code>
/// FirstOfTwo&lt;string&gt; race = pool.Before("in repair", "lost");
/// double repairedFirst = race.Probability("clean");
/// </code>
/// </example>
[DebuggerDisplay("{ToString(),nq}")]
[SuppressMessage("Naming", "CA1710", Justification = "That it enumerates is a convenience.")]
public sealed class FirstOfTwo<TState> : ICertified, IEnumerable<KeyValuePair<TState, double>>
    where TState : notnull
{
    private readonly double[] _first;
    private readonly double[] _second;
    private readonly double[] _neither;

    internal FirstOfTwo(
        StateSpace<TState> states, IReadOnlyList<TState> firsts, IReadOnlyList<TState> seconds, double[] first, double[] second, double[] neither, Certificate certificate)
    {
        States = states;
        Firsts = firsts;
        Seconds = seconds;
        _first = first;
        _second = second;
        _neither = neither;
        Certificate = certificate;
    }

    /// <summary>Gets the states, in the order of <see cref="Values"/>.</summary>
    public StateSpace<TState> States { get; }

    /// <summary>Gets the states of which one is to come first.</summary>
    public IReadOnlyList<TState> Firsts { get; }

    /// <summary>Gets the states that must not come before.</summary>
    public IReadOnlyList<TState> Seconds { get; }

    /// <summary>Gets the probabilities, in state order, that one of <see cref="Firsts"/> comes before any of <see cref="Seconds"/>.</summary>
    public ReadOnlySpan<double> Values => _first;

    /// <inheritdoc/>
    public Certificate Certificate { get; }

    /// <summary>Gets the probability that one of <see cref="Firsts"/> is reached before any of <see cref="Seconds"/>.</summary>
    /// <param name="from">The state to start in; 1 when it is one of the firsts, 0 when it is one of the seconds.</param>
    /// <exception cref="UnknownStateException">The label is none of the chain's states.</exception>
    public double Probability(TState from) => _first[States.Require(from)];

    /// <summary>Gets the probability that one of <see cref="Seconds"/> is reached before any of <see cref="Firsts"/>.</summary>
    /// <param name="from">The state to start in.</param>
    /// <exception cref="UnknownStateException">The label is none of the chain's states.</exception>
    public double ProbabilityOfSecond(TState from) => _second[States.Require(from)];

    /// <summary>Gets the probability that none of them is ever reached.</summary>
    /// <param name="from">The state to start in.</param>
    /// <exception cref="UnknownStateException">The label is none of the chain's states.</exception>
    public double ProbabilityOfNeither(TState from) => _neither[States.Require(from)];

    /// <summary>Enumerates the states with their probability of the first, in state order.</summary>
    public IEnumerator<KeyValuePair<TState, double>> GetEnumerator() => States.Select((state, position) => KeyValuePair.Create(state, _first[position])).GetEnumerator();

    IEnumerator IEnumerable.GetEnumerator() => GetEnumerator();

    /// <summary>A small table of the probabilities, the same in every culture.</summary>
    public override string ToString()
    {
        var table = StateTable.Write(States, ["from", "first", "second", "neither"], position => [_first[position], _second[position], _neither[position]]);
        return $"First {Text.List(Firsts)} or second {Text.List(Seconds)}{Environment.NewLine}{table}";
    }
}
