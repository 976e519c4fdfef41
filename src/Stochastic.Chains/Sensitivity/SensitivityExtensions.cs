using Stochastic.Chains.Internal;
using Stochastic.Chains.Kernels;
using Stochastic.Chains.Sensitivity;

namespace Stochastic.Chains;

/// <summary>How fast answers change when probabilities change: derivatives in a direction, rows kept summing to one.</summary>
/// <remarks>Where a move of probability 0 is given a positive rate, the derivative is one-sided.</remarks>
public static class SensitivityExtensions
{
    /// <summary>Computes the group inverse of I − P.</summary>
    /// <typeparam name="TState">The type of a state.</typeparam>
    /// <param name="chain">An irreducible chain.</param>
    /// <returns>The group inverse. O(states³) time, O(states²) memory.</returns>
    /// <exception cref="ChainStructureException">The chain is not irreducible.</exception>
    /// <exception cref="MemoryLimitException">The table of times takes more than 2 GiB.</exception>
    /// <example><code>double entry = chain.GroupInverse()["new", "failed"];</code></example>
    public static GroupInverse<TState> GroupInverse<TState>(this Chain<TState> chain)
        where TState : notnull
    {
        var (shares, times) = LongRun(chain);
        var size = shares.Length;
        var values = new double[size * size];
        for (var to = 0; to < size; to++)
        {
            var mean = default(CompensatedSum);
            for (var from = 0; from < size; from++)
            {
                mean.Add(shares[from] * Time(times, size, from, to));
            }

            for (var from = 0; from < size; from++)
            {
                values[(from * size) + to] = shares[to] * (mean.Value - Time(times, size, from, to));
            }
        }

        return new GroupInverse<TState>(chain.States, values);
    }

    /// <summary>Computes how fast the long-run shares change.</summary>
    /// <typeparam name="TState">The type of a state.</typeparam>
    /// <param name="chain">An irreducible chain.</param>
    /// <param name="changes">The direction: rates that sum to zero in each row.</param>
    /// <returns>The derivative of each share; they sum to zero. O(states³).</returns>
    /// <remarks>dπ_j = −π_j Σ_i π_i Σ_k dp_ik m_kj. Source: Golub and Meyer (1986), SIAM J. Alg. Disc. Meth. 7, 273–281, written with mean first passage times.</remarks>
    /// <exception cref="ChainStructureException">The chain is not irreducible.</exception>
    /// <exception cref="ArgumentException">The changes are no direction: not finite, not summing to zero in a row, or below a probability of zero.</exception>
    /// <exception cref="UnknownStateException">A change names a state that is not there.</exception>
    /// <example><code>double slope = pump.StationaryDerivative([new("new", "worn", 1), new("new", "new", -1)])["failed"];</code></example>
    public static StateDerivatives<TState> StationaryDerivative<TState>(this Chain<TState> chain, params IEnumerable<ProbabilityChange<TState>> changes)
        where TState : notnull
    {
        ArgumentNullException.ThrowIfNull(chain);
        var direction = Direction.Of(chain, changes);
        var (shares, times) = LongRun(chain);
        var values = new double[shares.Length];
        for (var to = 0; to < values.Length; to++)
        {
            var sum = default(CompensatedSum);
            foreach (var (row, change) in direction.MeanChanges(column => Time(times, values.Length, column, to)))
            {
                sum.Add(shares[row] * change);
            }

            values[to] = -shares[to] * sum.Value;
        }

        return new StateDerivatives<TState>(chain.States, values, "Mean first passage times");
    }

    /// <summary>Computes how fast the mean times until a target change.</summary>
    /// <typeparam name="TState">The type of a state.</typeparam>
    /// <param name="chain">A chain that reaches the target for sure from every state.</param>
    /// <param name="target">The target; changes of its own row play no part.</param>
    /// <param name="changes">The direction: rates that sum to zero in each row.</param>
    /// <returns>The derivative of the mean time from each state; 0 in the target. In the unit of the rates for chains made from rates. O(states³).</returns>
    /// <remarks>dh = N dP h with the fundamental matrix N of the chain stopped in the target.</remarks>
    /// <exception cref="ChainStructureException">The target may never be reached from some state, so that its mean time is infinite.</exception>
    /// <exception cref="ArgumentException">The changes are no direction: not finite, not summing to zero in a row, or below a probability of zero.</exception>
    /// <exception cref="UnknownStateException">The target or a change names a state that is not there.</exception>
    /// <example><code>double weeks = pool.TimeDerivative("lost", new("at shop", "lost", 1), new("at shop", "dirty", -1))["clean"];</code></example>
    public static StateDerivatives<TState> TimeDerivative<TState>(this Chain<TState> chain, TState target, params IEnumerable<ProbabilityChange<TState>> changes)
        where TState : notnull
    {
        ArgumentNullException.ThrowIfNull(chain);
        var direction = Direction.Of(chain, changes);
        var end = chain.States.Require(target);
        var times = chain.TimeTo(target).Values.ToArray();
        var never = Array.FindIndex(times, double.IsPositiveInfinity);
        if (never >= 0)
        {
            throw new ChainStructureException(Messages.NoTimeDerivative(target, chain.States[never]), [chain.States[never]]);
        }

        var weights = direction.MeanChanges(column => times[column]).Where(row => row.Row != end);
        return Propagate(chain.MakeAbsorbing(target), weights);
    }

    /// <summary>Computes how fast the probabilities of ending in a closed class change.</summary>
    /// <typeparam name="TState">The type of a state.</typeparam>
    /// <param name="chain">The chain.</param>
    /// <param name="into">A state of the closed class.</param>
    /// <param name="changes">The direction: rates that sum to zero in each row, in rows of transient states.</param>
    /// <returns>The derivative of the probability from each state; 0 in closed classes. O(states³).</returns>
    /// <remarks>db = N dP b with the fundamental matrix N of the transient states.</remarks>
    /// <exception cref="ChainStructureException">The state is not recurrent, or a change starts in a recurrent state, where another structure begins.</exception>
    /// <exception cref="ArgumentException">The changes are no direction: not finite, not summing to zero in a row, or below a probability of zero.</exception>
    /// <exception cref="UnknownStateException">The state or a change names a state that is not there.</exception>
    /// <example><code>double slope = pool.AbsorptionDerivative("lost", new("at shop", "lost", 1), new("at shop", "dirty", -1))["clean"];</code></example>
    public static StateDerivatives<TState> AbsorptionDerivative<TState>(this Chain<TState> chain, TState into, params IEnumerable<ProbabilityChange<TState>> changes)
        where TState : notnull
    {
        ArgumentNullException.ThrowIfNull(chain);
        var direction = Direction.Of(chain, changes);
        var structure = chain.Structure();
        foreach (var (row, _) in direction.Rows)
        {
            if (structure.ClassOf(chain.States[row]).IsRecurrent)
            {
                throw new ChainStructureException(Messages.ChangeInClosedClass(chain.States[row]), [chain.States[row]]);
            }
        }

        var absorption = chain.Absorption();
        var probabilities = chain.States.Select(from => absorption.Probability(from, into)).ToArray();
        return Propagate(chain, direction.MeanChanges(column => probabilities[column]));
    }

    /// <summary>Computes how fast the distribution after a number of steps changes.</summary>
    /// <typeparam name="TState">The type of a state.</typeparam>
    /// <param name="chain">The chain.</param>
    /// <param name="start">The state it starts in.</param>
    /// <param name="steps">The number of steps, 0 or more.</param>
    /// <param name="changes">The direction: rates that sum to zero in each row.</param>
    /// <returns>The derivative of the probability of each state; they sum to zero. O(steps · transitions).</returns>
    /// <exception cref="ArgumentOutOfRangeException">The number of steps is negative.</exception>
    /// <exception cref="ArgumentException">The changes are no direction: not finite, not summing to zero in a row, or below a probability of zero.</exception>
    /// <exception cref="UnknownStateException">The start or a change names a state that is not there.</exception>
    /// <example><code>double slope = pool.AfterDerivative("clean", 52, new("at shop", "lost", 1), new("at shop", "dirty", -1))["lost"];</code></example>
    public static StateDerivatives<TState> AfterDerivative<TState>(
        this Chain<TState> chain, TState start, int steps, params IEnumerable<ProbabilityChange<TState>> changes)
        where TState : notnull
    {
        ArgumentNullException.ThrowIfNull(chain);
        ArgumentOutOfRangeException.ThrowIfNegative(steps);
        var direction = Direction.Of(chain, changes);
        var (shares, slopes) = (new double[chain.StateCount], new double[chain.StateCount]);
        shares[chain.States.Require(start)] = 1;
        for (var step = 0; step < steps; step++)
        {
            var (nextShares, nextSlopes) = (new double[shares.Length], new double[shares.Length]);
            for (var row = 0; row < shares.Length; row++)
            {
                chain.Matrix.AddScaledRow(row, shares[row], nextShares);
                chain.Matrix.AddScaledRow(row, slopes[row], nextSlopes);
            }

            foreach (var (row, entries) in direction.Rows)
            {
                foreach (var (column, rate) in entries)
                {
                    nextSlopes[column] = Math.FusedMultiplyAdd(shares[row], rate, nextSlopes[column]);
                }
            }

            (shares, slopes) = (nextShares, nextSlopes);
        }

        return new StateDerivatives<TState>(chain.States, slopes, "Propagation");
    }

    /// <summary>Adds up the changes of the rows, each as often as its state is visited from a start.</summary>
    private static StateDerivatives<TState> Propagate<TState>(Chain<TState> chain, IEnumerable<(int Row, double Change)> changes)
        where TState : notnull
    {
        var values = new double[chain.StateCount];
        var visits = chain.Absorption().FundamentalMatrix();
        var rows = changes.ToList();
        var stepsPerUnit = chain.UniformizationRate ?? 1; // visits of a chain made from rates are times
        foreach (var from in visits.TransientStates)
        {
            var sum = default(CompensatedSum);
            foreach (var (row, change) in rows)
            {
                sum.Add(visits[from, chain.States[row]] * change);
            }

            values[chain.States.IndexOf(from)] = sum.Value * stepsPerUnit;
        }

        return new StateDerivatives<TState>(chain.States, values, "Fundamental matrix");
    }

    private static (double[] Shares, double[] Times) LongRun<TState>(Chain<TState> chain)
        where TState : notnull
    {
        ArgumentNullException.ThrowIfNull(chain);
        var structure = chain.Structure();
        return structure.IsIrreducible
            ? (chain.Stationary().ToArray(), chain.MeanFirstPassage().Values.ToArray())
            : throw new ChainStructureException(Messages.NotIrreducible(structure.Classes.Count), structure.Classes.Select(group => (object)group.States[0]));
    }

    /// <summary>The mean first passage time between two states; 0 from a state to itself.</summary>
    private static double Time(double[] times, int size, int from, int to) => from == to ? 0 : times[(from * size) + to];
}
