using Stochastic.Chains.Internal;
using Stochastic.Chains.Kernels;

namespace Stochastic.Chains.Passage;

/// <summary>
/// The equations of the first step over some states that are all left in the end: outflow · x = given + flow-weighted x of the next
/// states. Reduced once with the exits as explicit columns, then solved for any number of right-hand sides.
/// </summary>
internal sealed class ExitSystem<TState>
    where TState : notnull
{
    private readonly Chain<TState> _chain;
    private readonly int[] _members;
    private readonly int[] _columnOf;
    private readonly int _exits;
    private readonly GeneralReduction<ScaledDouble> _reduction;
    private readonly ScaledDouble[] _exitRates;

    /// <summary>Reduces the system over the members; a move to another state counts as exit number exitOf, or not at all when that is −1.</summary>
    internal ExitSystem(Chain<TState> chain, int[] members, int exits, Func<int, int> exitOf, SolveOptions options)
    {
        _chain = chain;
        _members = members;
        _exits = exits;
        _columnOf = new int[chain.StateCount];
        for (var state = 0; state < _columnOf.Length; state++)
        {
            var exit = exitOf(state);
            _columnOf[state] = exit < 0 ? -1 : members.Length + exit;
        }

        for (var k = 0; k < members.Length; k++)
        {
            _columnOf[members[k]] = k;
        }

        var columns = members.Length + exits;
        var table = RateTable.Bordered(chain.Matrix, members, _columnOf, columns, options);
        _exitRates = new ScaledDouble[members.Length * exits];
        for (var k = 0; k < members.Length; k++)
        {
            table.AsSpan((k * columns) + members.Length, exits).CopyTo(_exitRates.AsSpan(k * exits, exits));
        }

        _reduction = new GeneralReduction<ScaledDouble>(table, members.Length, columns, members.Length);
        _reduction.Eliminate(options.Report("elimination"), options.CancellationToken);
        RelativeErrorBound = SubtractionFreeBound.OfElimination(members.Length, columns, merges: chain.StateCount - members.Length);
    }

    /// <summary>The a priori bound on the relative error of every solution.</summary>
    internal double RelativeErrorBound { get; }

    /// <summary>The mean number of steps until an exit, divided by the steps per unit of time.</summary>
    internal double[] MeanTimes()
    {
        var times = Solve(_ => ScaledDouble.One);
        var means = new double[times.Length];
        for (var k = 0; k < means.Length; k++)
        {
            var mean = times[k] / (_chain.UniformizationRate ?? 1);
            means[k] = mean.ToDouble();
            if (!double.IsNormal(means[k]))
            {
                var state = _chain.States[_members[k]];
                throw new NumericalRangeException(Messages.TimeOutOfRange(state, mean.Exponent), Text.Label(state));
            }
        }

        return means;
    }

    /// <summary>The probability of leaving by one of the exits; rounding never takes it above one.</summary>
    internal double[] ExitProbabilities(int exit)
    {
        var solution = Solve(k => _exitRates[(k * _exits) + exit]);
        var probabilities = new double[solution.Length];
        for (var k = 0; k < probabilities.Length; k++)
        {
            probabilities[k] = Math.Min(1, solution[k].ToDouble());
            if (!solution[k].IsZero && !double.IsNormal(probabilities[k]))
            {
                var state = _chain.States[_members[k]];
                throw new NumericalRangeException(Messages.ProbabilityOutOfRange(state, solution[k].Exponent), Text.Label(state));
            }
        }

        return probabilities;
    }

    /// <summary>
    /// The largest relative difference of the two sides of the equations, re-computed from values of all states of the chain. The given
    /// term of a member is <paramref name="given"/>; targets without a column do not count.
    /// </summary>
    internal double Residual(double given, ReadOnlySpan<double> values)
    {
        var largest = 0.0;
        foreach (var member in _members)
        {
            var outflow = default(ScaledDouble);
            var inflow = (ScaledDouble)given;
            foreach (var (to, rate) in _chain.Matrix.Row(member))
            {
                if (to != member && _columnOf[to] >= 0)
                {
                    outflow += rate;
                    inflow += (ScaledDouble)rate * values[to];
                }
            }

            var ratio = values[member] > 0 ? (inflow / (outflow * values[member])).ToDouble() : inflow.IsZero ? 1 : 0;
            largest = Math.Max(largest, Math.Abs(ratio - 1));
        }

        return largest;
    }

    private ScaledDouble[] Solve(Func<int, ScaledDouble> given)
    {
        var values = new ScaledDouble[_members.Length];
        for (var k = 0; k < values.Length; k++)
        {
            values[k] = given(k);
        }

        _reduction.SolveRight(values);
        return values;
    }
}
