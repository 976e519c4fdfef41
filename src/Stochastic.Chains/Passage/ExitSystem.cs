using Stochastic.Chains.Internal;
using Stochastic.Chains.Kernels;

namespace Stochastic.Chains.Passage;

/// <summary>
/// The equations of the first step over some states that are all left in the end: outflow · x = given + flow-weighted x of the next
/// states. Reduced once with the exits as explicit columns, then solved for any number of right-hand sides.
/// </summary>
internal sealed class ExitSystem<TState> : IDisposable
    where TState : notnull
{
    private const int WideBytes = 16;

    private readonly Chain<TState> _chain;
    private readonly int[] _members;
    private readonly int[] _exitOf;
    private readonly int _exits;
    private readonly SolveOptions _options;
    private readonly RateTable _rates;
    private readonly WorkTable _table;
    private readonly double[] _sums;
    private readonly bool _staysInRange;
    private readonly int _merges;
    private GeneralReduction<ScaledDouble>? _wide;

    /// <summary>Reduces the system over the members; a move to another state counts as exit number exitOf, or not at all when that is −1.</summary>
    internal ExitSystem(Chain<TState> chain, int[] members, int exits, int[] exitOf, SolveOptions options)
    {
        _chain = chain;
        _members = members;
        _exitOf = exitOf;
        _exits = exits;
        _options = options;
        _merges = chain.StateCount - members.Length - exits;
        _rates = RateTable.WithExits(chain.Matrix, members, exits, state => exitOf[state]);
        _sums = new double[members.Length];
        options.RequireMemory(members.Length, sizeof(double) * (long)_rates.Rows * _rates.Columns);
        _table = WorkTable.Rent(_rates.Rows, _rates.Columns);
        _rates.CopyTo(_table.View);
        _staysInRange = StateReduction.Eliminate(
            _table.View, _rates.Rows, _rates.Columns, _rates.Rows, _sums, options.Parallelism, InstructionSet.Widest, options.CancellationToken);
    }

    /// <summary>The a priori bound on the relative error of every solution so far.</summary>
    internal double RelativeErrorBound => Math.Max(
        _staysInRange ? ReductionBound.OfSystem(_rates.Rows, _rates.Columns, _merges) : 0,
        _wide is not null ? SubtractionFreeBound.OfElimination(_rates.Rows, _rates.Columns, _merges) : 0);

    /// <summary>Gives the working memory back.</summary>
    public void Dispose() => _table.Dispose();

    /// <summary>The mean number of steps until an exit, divided by the steps per unit of time.</summary>
    internal double[] MeanTimes()
    {
        var times = Solve(_ => 1);
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
        var solution = Solve(k => ExitRate(k, exit));
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
                if (to != member && _rates.ColumnOf(to) >= 0)
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

    private double ExitRate(int member, int exit)
    {
        var rate = 0.0;
        foreach (var (to, probability) in _chain.Matrix.Row(_members[member]))
        {
            rate += IsExit(to) && _exitOf[to] == exit ? probability : 0;
        }

        return rate;
    }

    private bool IsExit(int state) => _rates.ColumnOf(state) >= _members.Length;

    private ScaledDouble[] Solve(Func<int, double> given)
    {
        var values = new double[_members.Length];
        for (var k = 0; k < values.Length; k++)
        {
            values[k] = given(k);
        }

        var wide = Array.ConvertAll(values, value => (ScaledDouble)value);
        if (_wide is null && _staysInRange && ReductionSolve.SolveRight(_table.View, _sums, _members.Length, values))
        {
            return Array.ConvertAll(values, value => (ScaledDouble)value);
        }

        _wide ??= ReduceWide();
        _wide.SolveRight(wide);
        return wide;
    }

    private GeneralReduction<ScaledDouble> ReduceWide()
    {
        _options.RequireMemory(_rates.Rows, WideBytes * (long)_rates.Rows * _rates.Columns);
        var reduction = new GeneralReduction<ScaledDouble>(_rates.ToArray<ScaledDouble>(rate => rate), _rates.Rows, _rates.Columns, _rates.Rows);
        reduction.Eliminate(_options.Report("elimination"), _options.CancellationToken);
        return reduction;
    }
}
