using Stochastic.Chains.Internal;
using Stochastic.Chains.Kernels;

namespace Stochastic.Chains;

/// <summary>Makes distributions over the states of a chain.</summary>
public static class Distribution
{
    private const double SumTolerance = 1e-9;

    /// <summary>Gives states their probabilities; states not named get zero.</summary>
    /// <typeparam name="TState">The type of a state.</typeparam>
    /// <param name="states">The states of the chain: <see cref="Chain{TState}.States"/>.</param>
    /// <param name="probabilities">States with their probabilities, each state at most once; the sum is 1 to within 10⁻⁹.</param>
    /// <exception cref="ArgumentException">A probability is not between 0 and 1, a state is repeated, or the sum is not 1.</exception>
    /// <exception cref="UnknownStateException">A label is none of the states.</exception>
    /// <example><code>var start = Distribution.Over(chain.States, ("clean", 0.7), ("dirty", 0.3));</code></example>
    public static Distribution<TState> Over<TState>(StateSpace<TState> states, params IEnumerable<(TState State, double Probability)> probabilities)
        where TState : notnull
    {
        var values = Collect(states, probabilities, (state, value) => value is >= 0 and <= 1 ? null : Messages.ProbabilityNotValid(state, value), nameof(probabilities));
        var sum = CompensatedSum.Of(values);
        return Math.Abs(sum - 1) <= SumTolerance
            ? new Distribution<TState>(states, values)
            : throw new ArgumentException(Messages.DistributionSum(sum), nameof(probabilities));
    }

    /// <summary>Shares out in proportion to counts or weights; states not named get zero.</summary>
    /// <typeparam name="TState">The type of a state.</typeparam>
    /// <param name="states">The states of the chain: <see cref="Chain{TState}.States"/>.</param>
    /// <param name="weights">States with their weights, 0 or more, each state at most once; at least one is positive.</param>
    /// <exception cref="ArgumentException">A weight is negative or not finite, a state is repeated, or all weights are zero.</exception>
    /// <exception cref="UnknownStateException">A label is none of the states.</exception>
    /// <example><code>var stockToday = Distribution.FromWeights(chain.States, ("clean", 1200), ("dirty", 310));</code></example>
    public static Distribution<TState> FromWeights<TState>(StateSpace<TState> states, params IEnumerable<(TState State, double Weight)> weights)
        where TState : notnull
    {
        var values = Collect(states, weights, (state, value) => double.IsFinite(value) && value >= 0 ? null : Messages.WeightNotValid(state, value), nameof(weights));
        var largest = values.Max();
        if (largest == 0)
        {
            throw new ArgumentException(Messages.WeightsSumToZero, nameof(weights));
        }

        // Scaled by a power of two first, so that the sum of the weights cannot overflow.
        var scale = -Math.ILogB(largest);
        foreach (ref var value in values.AsSpan())
        {
            value = Math.ScaleB(value, scale);
        }

        var sum = CompensatedSum.Of(values);
        foreach (ref var value in values.AsSpan())
        {
            value /= sum;
        }

        return new Distribution<TState>(states, values);
    }

    /// <summary>Gives every state the same probability.</summary>
    /// <typeparam name="TState">The type of a state.</typeparam>
    /// <param name="states">The states of the chain: <see cref="Chain{TState}.States"/>.</param>
    /// <example><code>var anywhere = Distribution.Uniform(chain.States);</code></example>
    public static Distribution<TState> Uniform<TState>(StateSpace<TState> states)
        where TState : notnull
    {
        ArgumentNullException.ThrowIfNull(states);
        var values = new double[states.Count];
        values.AsSpan().Fill(1.0 / states.Count);
        return new Distribution<TState>(states, values);
    }

    /// <summary>Puts everything into one state.</summary>
    /// <typeparam name="TState">The type of a state.</typeparam>
    /// <param name="states">The states of the chain: <see cref="Chain{TState}.States"/>.</param>
    /// <param name="state">The state that has probability 1.</param>
    /// <exception cref="UnknownStateException">The label is none of the states.</exception>
    /// <example><code>var start = Distribution.Certain(chain.States, "clean");</code></example>
    public static Distribution<TState> Certain<TState>(StateSpace<TState> states, TState state)
        where TState : notnull
    {
        ArgumentNullException.ThrowIfNull(states);
        var values = new double[states.Count];
        values[states.Require(state)] = 1;
        return new Distribution<TState>(states, values);
    }

    private static double[] Collect<TState>(
        StateSpace<TState> states, IEnumerable<(TState State, double Value)> shares, Func<TState, double, string?> fault, string parameter)
        where TState : notnull
    {
        ArgumentNullException.ThrowIfNull(states);
        ArgumentNullException.ThrowIfNull(shares, parameter);
        var values = new double[states.Count];
        var given = new bool[states.Count];
        foreach (var (state, value) in shares)
        {
            var position = states.Require(state);
            if (fault(state, value) is { } message)
            {
                throw new ArgumentException(message, parameter);
            }

            if (given[position])
            {
                throw new ArgumentException(Messages.RepeatedState(state), parameter);
            }

            given[position] = true;
            values[position] = value == 0 ? 0 : value; // a share of −0 is 0
        }

        return values;
    }
}
