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
    private const long MostTogether = 1 << 24;

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
    private ScaledDoubleDouble[][]? _exitRates;

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

    /// <summary>The factors in twice the working precision, made when they are first needed.</summary>
    private GeneralReduction<ScaledDoubleDouble> Doubled => _doubled ??= _rates.ReduceDoubled(_rates.Rows, _options);

    private ScaledDoubleDouble[][] RatesIntoExits => _exitRates ??= ExitRates.Of(_chain.Matrix, _members, _exitOf, _rates.Columns - _members.Length, IsExit);

    /// <summary>Gives the working memory back.</summary>
    public void Dispose() => _table.Dispose();

    /// <summary>A bound below 1 on the relative error of <see cref="SolveUpper"/>; +∞ when there is none.</summary>
    internal double SolveError => ReductionBound.OfSystem(_rates.Rows, _rates.Columns, _merges);

    /// <summary>A bound on the relative error of <see cref="SolveLeft"/>.</summary>
    internal double LeftError => _doubled is null ? SolveError : DoubledElimination.RelativeErrorBound(_rates.Rows, _rates.Columns, _merges);

    /// <summary>Solves A · x = given, both over the members.</summary>
    internal WideSolution Solve(ScaledDoubleDouble[] given) => Solve(given, new double[_chain.StateCount]);

    /// <summary>The mean number of steps until an exit, divided by the steps per unit of time.</summary>
    internal ExitSolution MeanTimes() => MeanTimes(Array.ConvertAll(_members, _ => 1.0));

    /// <summary>The mean number of steps until an exit, each weighted with the weight of the state it is made in, over the steps per unit of time.</summary>
    internal ExitSolution MeanTimes(double[] weights) =>
        Solve(Array.ConvertAll(weights, weight => (ScaledDoubleDouble)weight / (_chain.UniformizationRate ?? 1)))
            .ToDoubles(_chain.States, _members, Messages.TimeOutOfRange);

    /// <summary>The probability of leaving by one of the exits; rounding never takes it above one.</summary>
    internal ExitSolution ExitProbabilities(int exit)
    {
        var atExits = new double[_chain.StateCount];
        for (var state = 0; state < atExits.Length; state++)
        {
            atExits[state] = IsExit(state) && _exitOf[state] == exit ? 1 : 0;
        }

        var solution = Solve(RatesIntoExits[exit], atExits).ToDoubles(_chain.States, _members, Messages.ProbabilityOutOfRange);
        return solution with { Values = Array.ConvertAll(solution.Values, value => Math.Min(1, value)) };
    }

    /// <summary>
    /// Mean times, then the probabilities of all exits, solved together, for when no proof of each is asked for; null when a number left the range of
    /// doubles, or a proof is asked for.
    /// </summary>
    internal ExitSolution[]? TrySolveTogether()
    {
        var exits = _rates.Columns - _members.Length;
        if (_options.CertificateLevel == CertificateLevel.Proof || !_staysInRange || (long)_members.Length * (exits + 1) > MostTogether)
        {
            return null;
        }

        using var columns = WorkTable.Rent(_members.Length, exits + 1);
        var unit = 1 / (_chain.UniformizationRate ?? 1);
        for (var k = 0; k < _members.Length; k++)
        {
            columns.View[k, 0] = unit;
            for (var exit = 0; exit < exits; exit++)
            {
                columns.View[k, exit + 1] = RatesIntoExits[exit][k].ToDouble();
            }
        }

        var sharing = new WorkSharing(_options.Parallelism, _options.CancellationToken);
        if (!ReductionSolve.SolveRight(_table.View, _sums, _members.Length, columns.View, exits + 1, InstructionSet.Widest, sharing))
        {
            return null;
        }

        var view = columns.View;
        return [.. Enumerable.Range(0, exits + 1).Select(column => new ExitSolution(
            [.. Enumerable.Range(0, _members.Length).Select(k => column == 0 ? view[k, 0] : Math.Min(1, view[k, column]))], ErrorBasis.SubtractionFree, SolveError))];
    }

    /// <summary>Solves y · A = given, both over the members: mean numbers of visits from a start.</summary>
    internal WideSolution SolveLeft(ScaledDoubleDouble[] given)
    {
        var bound = SolveError;
        if (_staysInRange && TryConvert(given, out var solution) && (!MustDouble(bound)) &&
            ReductionSolve.SolveLeft(_table.View, _sums, _members.Length, solution))
        {
            return new WideSolution(Array.ConvertAll(solution, value => (ScaledDoubleDouble)value), ErrorBasis.SubtractionFree, bound, bound);
        }

        ScaledDoubleDouble[] values = [.. given];
        Doubled.SolveLeft(values);
        return DoubledSolution(values);
    }

    /// <summary>The inverse of A, row-major over the members, divided by the steps per unit of time: mean numbers of visits between all pairs.</summary>
    internal VisitTable Inverse()
    {
        var count = _members.Length;
        _options.RequireMemory(count, 2 * sizeof(double) * (long)count * count);
        var unit = 1 / (_chain.UniformizationRate ?? 1);
        if (_staysInRange)
        {
            using var columns = WorkTable.Rent(count, count);
            for (var k = 0; k < count; k++)
            {
                columns.View.Row(k, 0, count).Clear();
                columns.View[k, k] = unit;
            }

            var sharing = new WorkSharing(_options.Parallelism, _options.CancellationToken);
            if (ReductionSolve.SolveRight(_table.View, _sums, count, columns.View, count, InstructionSet.Widest, sharing))
            {
                var values = new double[count * count];
                for (var k = 0; k < count; k++)
                {
                    columns.View.Row(k, 0, count).CopyTo(values.AsSpan(k * count));
                }

                return new VisitTable(count, values, ErrorBasis.SubtractionFree, SolveError);
            }
        }

        return InverseDoubled(unit);
    }

    /// <summary>y · A = given in double where that is possible, in place; in twice the precision and rounded otherwise.</summary>
    internal void IterateLeft(double[] values)
    {
        double[] trial = [.. values];
        if (_staysInRange && ReductionSolve.SolveLeft(_table.View, _sums, _members.Length, trial))
        {
            trial.CopyTo(values, 0);
            return;
        }

        var wide = Array.ConvertAll(values, value => (ScaledDoubleDouble)value);
        Doubled.SolveLeft(wide);
        Array.ConvertAll(wide, value => value.ToDouble()).CopyTo(values, 0);
    }

    /// <summary>
    /// Solves A · x = bounds for numbers of which only the size matters, in double or else in twice the precision; the relative error of an
    /// entry is at most <see cref="SolveError"/>.
    /// </summary>
    internal ScaledDoubleDouble[] SolveUpper(ScaledDoubleDouble[] bounds)
    {
        if (_staysInRange && TryConvert(bounds, out var solution) && ReductionSolve.SolveRight(_table.View, _sums, _members.Length, solution))
        {
            return Array.ConvertAll(solution, value => (ScaledDoubleDouble)value);
        }

        ScaledDoubleDouble[] values = [.. bounds];
        Doubled.SolveRight(values);
        return values;
    }

    /// <summary>
    /// The largest relative difference of the two sides of the equations, re-computed from the given terms of the members and from values of
    /// all states of the chain.
    /// </summary>
    internal double Residual(ScaledDoubleDouble[] given, ScaledDoubleDouble[] values) =>
        _chain.Matrix.OnRates<double, FirstStepResidual>(new FirstStepResidual(_members, given, values));

    /// <summary>The same with one given term for all members.</summary>
    internal double Residual(double given, double[] values) => Residual(
        Array.ConvertAll(_members, _ => (ScaledDoubleDouble)given), Array.ConvertAll(values, value => double.IsFinite(value) ? (ScaledDoubleDouble)value : default));

    /// <summary>The same for y · A = given: the largest relative difference between y · outflow and given + what flows in.</summary>
    internal double LeftResidual(ScaledDoubleDouble[] given, double[] solution)
    {
        var inflows = new ScaledDoubleDouble[_chain.StateCount];
        var outflows = new ScaledDoubleDouble[_members.Length];
        for (var k = 0; k < _members.Length; k++)
        {
            inflows[_members[k]] += given[k];
            foreach (var (to, rate) in _chain.Matrix.Row(_members[k]))
            {
                if (to != _members[k])
                {
                    var flow = (ScaledDoubleDouble)solution[k] * rate;
                    outflows[k] += flow;
                    inflows[to] += flow;
                }
            }
        }

        return Enumerable.Range(0, _members.Length)
            .Max(k => outflows[k].IsZero ? 0 : Math.Abs((inflows[_members[k]] / outflows[k]).ToDouble() - 1));
    }

    private VisitTable InverseDoubled(double unit)
    {
        var count = _members.Length;
        var values = new double[count * count];
        var bound = 0.0;
        for (var column = 0; column < count; column++)
        {
            _options.CancellationToken.ThrowIfCancellationRequested();
            var given = new ScaledDoubleDouble[count];
            given[column] = unit;
            Doubled.SolveRight(given);
            var solution = DoubledSolution(given).ToDoubles(_chain.States, _members, Messages.VisitsOutOfRange);
            bound = solution.RelativeErrorBound;
            for (var row = 0; row < count; row++)
            {
                values[(row * count) + column] = solution.Values[row];
            }
        }

        return new VisitTable(count, values, ErrorBasis.DoubledElimination, bound);
    }

    private bool IsExit(int state) => _rates.ColumnOf(state) >= _members.Length;

    private static bool TryConvert(ScaledDoubleDouble[] given, out double[] doubles)
    {
        doubles = Array.ConvertAll(given, value => value.ToDouble());
        for (var k = 0; k < given.Length; k++)
        {
            if (!given[k].IsZero && !double.IsNormal(doubles[k]))
            {
                return false;
            }
        }

        return true;
    }

    /// <summary>Whether a proof is asked for that this bound does not give, of a system small enough to be reduced once more for it.</summary>
    private bool MustDouble(double bound) =>
        _options.CertificateLevel == CertificateLevel.Proof && !(bound <= DoubledElimination.GoodEnough) && _members.Length <= DoubledElimination.MostStates;

    /// <summary>From the fastest way to the most careful; each is left for the next where it cannot do what is asked.</summary>
    private WideSolution Solve(ScaledDoubleDouble[] given, double[] elsewhere)
    {
        var fast = _staysInRange && TryConvert(given, out var doubles) ? SolveFast(doubles, elsewhere) : null;
        if (fast is not null && !MustDouble(fast.RelativeErrorBound))
        {
            return new WideSolution(Array.ConvertAll(fast.Values, value => (ScaledDoubleDouble)value), fast.Basis, fast.RelativeErrorBound, fast.RelativeErrorBound);
        }

        ScaledDoubleDouble[] solution = [.. given];
        Doubled.SolveRight(solution);
        return DoubledSolution(solution);
    }

    private WideSolution DoubledSolution(ScaledDoubleDouble[] values) => new(
        values,
        ErrorBasis.DoubledElimination,
        DoubledElimination.RelativeErrorBound(_rates.Rows, _rates.Columns, _merges),
        DoubledElimination.WideErrorBound(_rates.Rows, _rates.Columns, _merges));

    private ExitSolution? SolveFast(double[] given, double[] elsewhere)
    {
        var solution = given.AsSpan().ToArray();
        if (!ReductionSolve.SolveRight(_table.View, _sums, _members.Length, solution))
        {
            return null;
        }

        var bound = SolveError;
        if (_options.CertificateLevel != CertificateLevel.Proof || !(bound < 1))
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

    private readonly struct Refinement(
        int[] members, double[] given, double[] values, TableFactors factors, double solveError, CancellationToken cancellation) : IRateAlgorithm<double>
    {
        public double Run<TRows>(TRows rows)
            where TRows : struct, IRateRows =>
            RefinedSystem.Refine(rows, members, given, values.AsSpan(), factors, solveError, cancellation);
    }
}
