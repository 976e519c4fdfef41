using Stochastic.Chains.Internal;
using Stochastic.Chains.Kernels;

namespace Stochastic.Chains.Passage;

/// <summary>
/// The whole table of mean first passage times. The structure says first which are finite; each recurrent class with the states that surely
/// end in it is one system, the transient states among each other another.
/// </summary>
internal sealed class FirstPassageSolve<TState>
    where TState : notnull
{
    private readonly Chain<TState> _chain;
    private readonly SolveOptions _options;
    private readonly InstructionSet _instructions;
    private readonly double _stepsPerTime;
    private readonly double[] _values;
    private readonly double[] _returns;
    private double _roundings;
    private double _residual;
    private bool _isWide;
    private bool _hasSolved;

    private FirstPassageSolve(Chain<TState> chain, SolveOptions options, InstructionSet instructions)
    {
        _chain = chain;
        _options = options;
        _instructions = instructions;
        _stepsPerTime = chain.UniformizationRate ?? 1;
        options.RequireMemory(chain.StateCount, sizeof(double) * (long)chain.StateCount * chain.StateCount);
        _values = GC.AllocateUninitializedArray<double>(chain.StateCount * chain.StateCount);
        _returns = new double[chain.StateCount];
        Array.Fill(_returns, double.PositiveInfinity);
    }

    private int Size => _chain.StateCount;

    internal static FirstPassageTable<TState> Of(Chain<TState> chain, SolveOptions options, InstructionSet instructions)
    {
        var solve = new FirstPassageSolve<TState>(chain, options, instructions);
        solve.Fill();
        return new FirstPassageTable<TState>(chain, solve._values, solve._returns, solve.Certify(), options);
    }

    private void Fill()
    {
        var structure = _chain.Structure();
        var transient = structure.TransientPositions;
        if (!structure.IsIrreducible)
        {
            Array.Fill(_values, double.PositiveInfinity);
        }

        var ends = SureEnds<TState>.Of(_chain);
        for (var end = 0; end < ends.Length; end++)
        {
            FillEnd(ends[end], structure.RecurrentClasses[end].Members.Length);
        }

        if (transient.Length > 1)
        {
            FillTransient(transient);
        }
    }

    /// <summary>The columns of a recurrent class, whose states come first.</summary>
    private void FillEnd(int[] states, int targets)
    {
        if (states.Length == 1)
        {
            _returns[states[0]] = 1;
            _values[Place(states[0], states[0])] = _chain.UniformizationRate is null ? 1 : double.PositiveInfinity;
            return;
        }

        using var system = PassageSystem.Among(_chain.Matrix, states, targets, _options);
        var isWhole = states.Length == Size && targets == Size;
        using var scattered = isWhole ? null : WorkTable.Rent(states.Length, targets);
        var steps = scattered?.View ?? new MatrixView(_values, 0, Size);
        system.Solve(steps, _instructions, (from, to, exponent) => Refuse(states[from], states[to], exponent));
        var returns = system.Returns(steps);
        Note(system, steps, system.Roundings, (_, _) => true);
        for (var from = 0; from < states.Length; from++)
        {
            if (isWhole && _stepsPerTime == 1)
            {
                break;
            }

            for (var to = 0; to < targets; to++)
            {
                Set(states[from], states[to], steps[from, to] / _stepsPerTime);
            }
        }

        for (var state = 0; state < targets; state++)
        {
            _returns[states[state]] = returns[state];
            var wait = _chain.UniformizationRate is null ? 1 : _stepsPerTime * system.Outflow(state);
            var value = targets == 1 && _chain.UniformizationRate is not null ? double.PositiveInfinity : returns[state] / wait;
            _values[Place(states[state], states[state])] = targets == 1
                ? value
                : double.IsNormal(value) ? value : throw Refuse(states[state], states[state], Math.ILogB(returns[state]) - Math.ILogB(wait));
        }
    }

    /// <summary>
    /// The finite times among transient states. With all recurrent states taken as one, from which every transient state is entered again, the
    /// chain is irreducible; the time to a state that is surely passed before the end is the same there.
    /// </summary>
    private void FillTransient(int[] transient)
    {
        var ways = SureWays.Among(_chain.Matrix, transient);
        if (!ways.HasAny)
        {
            return;
        }

        var count = transient.Length;
        var isSure = new bool[count * count];
        for (var from = 0; from < count; from++)
        {
            foreach (var to in ways.After(from))
            {
                isSure[(from * count) + to] = true;
            }
        }

        using var system = new PassageSystem(count + 1, count + 1, _options);
        var merges = FillMerged(system.Rates, transient);
        using var table = WorkTable.Rent(count + 1, count + 1);
        var steps = table.View;
        system.Solve(steps, _instructions, (from, to, exponent) =>
            from < count && to < count && isSure[(from * count) + to] ? Refuse(transient[from], transient[to], exponent) : null);
        Note(system, steps, system.Roundings + (2.0 * count * merges), (from, to) => from < count && to < count && isSure[(from * count) + to]);
        for (var from = 0; from < count; from++)
        {
            foreach (var to in ways.After(from))
            {
                Set(transient[from], transient[to], steps[from, to] / _stepsPerTime);
            }
        }
    }

    /// <summary>The rates among the transient states with the recurrent ones as one more; returns the most rates that were added up for it.</summary>
    private int FillMerged(MatrixView rates, int[] transient)
    {
        var numberOf = new int[Size];
        Array.Fill(numberOf, transient.Length);
        for (var k = 0; k < transient.Length; k++)
        {
            numberOf[transient[k]] = k;
        }

        var most = 0;
        for (var k = 0; k < transient.Length; k++)
        {
            var row = rates.Row(k, 0, transient.Length + 2);
            row.Clear();
            var merged = 0;
            foreach (var (to, rate) in _chain.Matrix.Row(transient[k]))
            {
                row[numberOf[to]] += rate;
                merged += numberOf[to] == transient.Length ? 1 : 0;
            }

            row[k] = 0;
            row[^1] = 1;
            most = Math.Max(most, merged);
        }

        var back = rates.Row(transient.Length, 0, transient.Length + 2);
        back.Fill(1);
        back[^2] = 0;
        return most;
    }

    private void Note(PassageSystem system, MatrixView steps, double roundings, Func<int, int, bool> isAsked)
    {
        _hasSolved = true;
        _isWide |= system.IsWide;
        _roundings = Math.Max(_roundings, roundings);
        if (_options.CertificateLevel >= CertificateLevel.Residual)
        {
            _residual = Math.Max(_residual, system.Residual(steps, _instructions, isAsked));
        }
    }

    private void Set(int from, int to, double time)
    {
        if (from != to)
        {
            _values[Place(from, to)] = double.IsNormal(time) ? time : throw Refuse(from, to, Math.ILogB(time));
        }
    }

    private int Place(int from, int to) => (from * Size) + to;

    private NumericalRangeException Refuse(int from, int to, long exponent) =>
        new(Messages.PassageOutOfRange(_chain.States[from], _chain.States[to], exponent), Text.Label(_chain.States[from]));

    /// <summary>A time back adds products and quotients to the times that it is made of: one rounding for each state, and those of an outflow.</summary>
    private Certificate Certify()
    {
        if (!_hasSolved)
        {
            return FirstPassageCertificate.OfStructure;
        }

        var error = ReductionBound.OfRoundings(_roundings + (2.0 * Size) + 8);
        return FirstPassageCertificate.Of(_options.CertificateLevel, error, _residual, _values, _isWide);
    }
}
