using Stochastic.Chains.Internal;
using Stochastic.Chains.Kernels;

namespace Stochastic.Chains.Passage;

/// <summary>
/// The equations of the first step over some states that are all left in the end: outflow · x = given + flow-weighted x of the next
/// states. Reduced once with the exits as explicit columns (Alfa, Xue and Ye 2002), then solved for any number of right-hand sides.
/// </summary>
internal sealed class ExitSystem<TState> : IDisposable
    where TState : notnull
{
    private readonly Chain<TState> _chain;
    private readonly int[] _members;
    private readonly int[] _exitOf;
    private readonly SolveOptions _options;
    private readonly RateTable _rates;
    private readonly WorkTable _table;
    private readonly double[] _sums;
    private readonly bool _staysInRange;
    private readonly int _merges;
    private GeneralReduction<ScaledDoubleDouble>? _doubled;

    /// <summary>Reduces the system over the members; a move to another state counts as exit number exitOf, or not at all when that is −1.</summary>
    internal ExitSystem(Chain<TState> chain, int[] members, int exits, int[] exitOf, SolveOptions options)
    {
        _chain = chain;
        _members = members;
        _exitOf = exitOf;
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

    /// <summary>Gives the working memory back.</summary>
    public void Dispose() => _table.Dispose();

    /// <summary>The mean number of steps until an exit, divided by the steps per unit of time.</summary>
    internal ExitSolution MeanTimes()
    {
        var given = Array.ConvertAll(_members, _ => (ScaledDoubleDouble)(1 / (_chain.UniformizationRate ?? 1)));
        return Solve(given, new double[_chain.StateCount], Messages.TimeOutOfRange);
    }

    /// <summary>The probability of leaving by one of the exits; rounding never takes it above one.</summary>
    internal ExitSolution ExitProbabilities(int exit)
    {
        var atExits = new double[_chain.StateCount];
        for (var state = 0; state < atExits.Length; state++)
        {
            atExits[state] = IsExit(state) && _exitOf[state] == exit ? 1 : 0;
        }

        var given = Array.ConvertAll(_members, member => ExitRate(member, exit));
        var solution = Solve(given, atExits, Messages.ProbabilityOutOfRange);
        return solution with { Values = Array.ConvertAll(solution.Values, value => Math.Min(1, value)) };
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

    private bool IsExit(int state) => _rates.ColumnOf(state) >= _members.Length;

    private ScaledDoubleDouble ExitRate(int member, int exit)
    {
        var rate = default(ScaledDoubleDouble);
        foreach (var (to, probability) in _chain.Matrix.Row(member))
        {
            rate += IsExit(to) && _exitOf[to] == exit ? probability : 0;
        }

        return rate;
    }

    /// <summary>From the fastest way to the most careful; each is left for the next where it cannot do what is asked.</summary>
    private ExitSolution Solve(ScaledDoubleDouble[] given, double[] elsewhere, Func<object, long, string> outOfRange)
    {
        var mustProve = _options.CertificateLevel == CertificateLevel.Proof;
        var fast = _staysInRange ? SolveFast(Array.ConvertAll(given, value => value.ToDouble()), elsewhere, mustProve) : null;
        return fast is not null && (!mustProve || fast.RelativeErrorBound <= DoubledElimination.GoodEnough || _members.Length > DoubledElimination.MostStates)
            ? fast
            : SolveDoubled(given, outOfRange);
    }

    private ExitSolution? SolveFast(double[] given, double[] elsewhere, bool mustProve)
    {
        var solution = given.AsSpan().ToArray();
        if (!ReductionSolve.SolveRight(_table.View, _sums, _members.Length, solution))
        {
            return null;
        }

        var bound = ReductionBound.OfSystem(_rates.Rows, _rates.Columns, _merges);
        if (!mustProve || !(bound < 1))
        {
            return new ExitSolution(solution, ErrorBasis.SubtractionFree, bound);
        }

        // The equations as refinement states them: what is given at the exits stands beside them, not in the right-hand side.
        var isTimes = Array.TrueForAll(elsewhere, value => value == 0);
        var values = elsewhere.AsSpan().ToArray();
        for (var k = 0; k < _members.Length; k++)
        {
            values[_members[k]] = solution[k];
        }

        var rightHandSide = isTimes ? given : new double[given.Length];
        var refined = _chain.Matrix.OnRates<double, Refinement>(new Refinement(
            _members, rightHandSide, values, new TableFactors(_table.View, _sums), bound, _options.CancellationToken));
        return refined < bound
            ? new ExitSolution(Array.ConvertAll(_members, member => values[member]), ErrorBasis.RefinedMonotone, refined)
            : new ExitSolution(solution, ErrorBasis.SubtractionFree, bound);
    }

    private ExitSolution SolveDoubled(ScaledDoubleDouble[] given, Func<object, long, string> outOfRange)
    {
        _doubled ??= _rates.ReduceDoubled(_rates.Rows, _options);
        ScaledDoubleDouble[] solution = [.. given];
        _doubled.SolveRight(solution);
        var values = Array.ConvertAll(solution, value => value.ToDouble());
        for (var k = 0; k < values.Length; k++)
        {
            if (!solution[k].IsZero && !double.IsNormal(values[k]))
            {
                var state = _chain.States[_members[k]];
                throw new NumericalRangeException(outOfRange(state, solution[k].Exponent), Text.Label(state));
            }
        }

        return new ExitSolution(values, ErrorBasis.DoubledElimination, DoubledElimination.RelativeErrorBound(_rates.Rows, _rates.Columns, _merges));
    }

    private readonly struct Refinement(
        int[] members, double[] given, double[] values, TableFactors factors, double solveError, CancellationToken cancellation) : IRateAlgorithm<double>
    {
        public double Run<TRows>(TRows rows)
            where TRows : struct, IRateRows =>
            RefinedSystem.Refine(rows, members, given, values.AsSpan(), factors, solveError, cancellation);
    }
}
