using Stochastic.Chains.Internal;
using Stochastic.Chains.Kernels;

namespace Stochastic.Chains;

/// <summary>Puts a chain together from moves in any order, gathering every fault on the way.</summary>
internal sealed class ChainAssembler<TState>
    where TState : notnull
{
    private readonly StateSpaceBuilder<TState> _states;
    private readonly bool _statesAreGiven;
    private readonly RowSums _rowSums;
    private readonly TripletList _moves = new();
    private readonly Dictionary<int, double> _refused = [];
    private long _read;

    /// <summary>Starts with no states: they are added as they are seen.</summary>
    internal ChainAssembler(ChainOptions<TState> options)
        : this(new StateSpaceBuilder<TState>(options.Comparer), statesAreGiven: false, options, new FaultCollector())
    {
    }

    private ChainAssembler(StateSpaceBuilder<TState> states, bool statesAreGiven, ChainOptions<TState> options, FaultCollector faults)
    {
        _states = states;
        _statesAreGiven = statesAreGiven;
        _rowSums = options.RowSums;
        Faults = faults;
    }

    internal FaultCollector Faults { get; }

    /// <summary>Starts with the complete list of states: any other label is a fault.</summary>
    internal static ChainAssembler<TState> ForStates(IEnumerable<TState> states, ChainOptions<TState> options)
    {
        var faults = new FaultCollector();
        return new ChainAssembler<TState>(StateSpaceBuilder<TState>.FromList(states, options.Comparer, faults), statesAreGiven: true, options, faults);
    }

    internal int FindOrAdd(TState state) => _states.FindOrAdd(state);

    /// <summary>Takes one move. A zero is no transition, but it does make its states known.</summary>
    internal void Add(TState from, TState to, double value)
    {
        var number = _read++;
        if (from is null || to is null)
        {
            Faults.Add(ChainFaultKind.NullState, [from, to], number, Messages.NullStateInMove(number));
        }

        var row = from is null ? -1 : Locate(from, from, to);
        var column = to is null ? -1 : Locate(to, from, to);
        if (row >= 0 && column >= 0 && value != 0)
        {
            _moves.Add(row, column, value);
        }
        else if (row >= 0 && column < 0)
        {
            _refused[row] = _refused.GetValueOrDefault(row) + value;
        }
    }

    /// <summary>Reads the moves as probabilities per step.</summary>
    internal Chain<TState>? Assemble()
    {
        if (_states.Count == 0)
        {
            ReportNoStates();
            return null;
        }

        var states = _states.ToStateSpace();
        var rows = _moves.ToCompressedRows(states.Count);
        return FromRows(states, rows, uniformizationRate: null);
    }

    /// <summary>Reads the moves as rates per unit of time.</summary>
    internal Chain<TState>? AssembleRates()
    {
        if (_states.Count == 0)
        {
            ReportNoStates();
            return null;
        }

        var states = _states.ToStateSpace();
        var rates = _moves.ToCompressedRows(states.Count);
        var uniformized = Uniformization<TState>.Apply(states, rates, Faults);
        return uniformized is null ? null : FromRows(states, uniformized.Value.Rows, uniformized.Value.Rate);
    }

    private Chain<TState>? FromRows(StateSpace<TState> states, CompressedRows rows, double? uniformizationRate)
    {
        var validator = new RowValidator<TState>(states, _rowSums, Faults);
        validator.CheckAll(rows, _refused);
        return Faults.HasFaults
            ? null
            : new Chain<TState>(states, TransitionMatrix.FromCompressedRows(rows), validator.Rescaled, uniformizationRate);
    }

    private int Locate(TState state, TState? from, TState? to)
    {
        if (!_statesAreGiven)
        {
            return _states.FindOrAdd(state);
        }

        var position = _states.Find(state);
        if (position < 0)
        {
            Faults.Add(ChainFaultKind.UnknownState, [state], _read - 1, Messages.UnknownStateInMove(state, from, to));
        }

        return position;
    }

    private void ReportNoStates()
    {
        if (!Faults.HasFaults)
        {
            Faults.Add(ChainFaultKind.NoStates, [], 0, Messages.NoStates);
        }
    }
}
