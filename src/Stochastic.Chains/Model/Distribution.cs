using System.Collections;
using System.Diagnostics;
using System.Diagnostics.CodeAnalysis;
using Stochastic.Chains.Internal;
using Stochastic.Chains.Kernels;

namespace Stochastic.Chains;

/// <summary>How something is shared out over the states of a chain: a probability for each state.</summary>
/// <typeparam name="TState">The type of a state.</typeparam>
/// <remarks>Immutable and safe for concurrent use. Enumerates in state order, states of probability zero included.</remarks>
/// <example>
/// <code>
/// Distribution&lt;string&gt; next = chain.Row("dirty");
/// double washed = next["in wash"];
/// double meanCost = next.Expectation(state => state == "in repair" ? 4.80 : 0.35);
/// </code>
/// </example>
[DebuggerDisplay("{ToString(),nq}")]
[SuppressMessage("Naming", "CA1710", Justification = "A distribution is the trade's word; that it can be read as a dictionary is a convenience.")]
public class Distribution<TState> : IReadOnlyDictionary<TState, double>
    where TState : notnull
{
    private readonly double[] _values;

    /// <summary>Takes ownership of probabilities in state order.</summary>
    internal Distribution(StateSpace<TState> states, double[] values)
    {
        States = states;
        _values = values;
    }

    /// <summary>Gets the states, in the order of <see cref="Values"/>.</summary>
    public StateSpace<TState> States { get; }

    /// <summary>Gets the probabilities in state order.</summary>
    public ReadOnlySpan<double> Values => _values;

    /// <summary>Gets the number of states.</summary>
    public int Count => _values.Length;

    IEnumerable<TState> IReadOnlyDictionary<TState, double>.Keys => States;

    IEnumerable<double> IReadOnlyDictionary<TState, double>.Values => _values.AsReadOnly();

    /// <summary>Gets the probability of a state.</summary>
    /// <param name="state">One of the states.</param>
    /// <exception cref="UnknownStateException">The label is none of the states.</exception>
    [SuppressMessage("Design", "CA1043", Justification = "States are the keys.")]
    public double this[TState state] => _values[States.Require(state)];

    /// <summary>Tells whether a label is one of the states, whatever its probability.</summary>
    /// <param name="key">The label to look for.</param>
    public bool ContainsKey(TState key) => States.Contains(key);

    /// <summary>Reads the probability of a state if there is such a state.</summary>
    /// <param name="key">The label to look for.</param>
    /// <param name="value">Its probability, or 0 when it is none of the states.</param>
    public bool TryGetValue(TState key, out double value)
    {
        var position = States.IndexOf(key);
        value = position >= 0 ? _values[position] : 0;
        return position >= 0;
    }

    /// <summary>Copies the probabilities into a new array, in state order.</summary>
    public double[] ToArray() => [.. _values];

    /// <summary>Averages a figure over the states, each weighted with its probability.</summary>
    /// <param name="figure">The figure of a state: a cost, a duration, 1 or 0. Called for states of positive probability only.</param>
    /// <example><code>double late = distribution.Expectation(state => state == "lost" ? 1 : 0);</code></example>
    public double Expectation(Func<TState, double> figure)
    {
        ArgumentNullException.ThrowIfNull(figure);
        var sum = default(CompensatedSum);
        for (var k = 0; k < _values.Length; k++)
        {
            if (_values[k] > 0)
            {
                sum.Add(_values[k] * figure(States[k]));
            }
        }

        return sum.Value;
    }

    /// <summary>
    /// Measures how far apart two distributions are: half the sum of the absolute differences, from 0 (equal) to 1 (no state in
    /// common). It is the largest difference that any yes-or-no question about the state can show.
    /// </summary>
    /// <param name="other">A distribution over the same states in the same order.</param>
    /// <exception cref="ArgumentException">The other distribution is over other states.</exception>
    public double TotalVariation(Distribution<TState> other)
    {
        ArgumentNullException.ThrowIfNull(other);
        if (!States.Matches(other.States))
        {
            throw new ArgumentException(Messages.DifferentStates(Count, other.Count), nameof(other));
        }

        var sum = default(CompensatedSum);
        for (var k = 0; k < _values.Length; k++)
        {
            sum.Add(Math.Abs(_values[k] - other._values[k]));
        }

        return sum.Value / 2;
    }

    /// <summary>Lists the most likely states, most likely first; equals in state order.</summary>
    /// <param name="count">How many to list at most, 0 or more.</param>
    public IReadOnlyList<KeyValuePair<TState, double>> MostLikely(int count)
    {
        ArgumentOutOfRangeException.ThrowIfNegative(count);
        return [.. this.OrderByDescending(pair => pair.Value).Take(count)];
    }

    /// <summary>Enumerates the states with their probabilities, in state order.</summary>
    public IEnumerator<KeyValuePair<TState, double>> GetEnumerator()
    {
        for (var k = 0; k < _values.Length; k++)
        {
            yield return KeyValuePair.Create(States[k], _values[k]);
        }
    }

    /// <summary>A small table of the states and probabilities, the same in every culture; of many states the most likely ten.</summary>
    public override string ToString() => DistributionText.Write(this);

    IEnumerator IEnumerable.GetEnumerator() => GetEnumerator();
}
