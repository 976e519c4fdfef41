using Stochastic.Chains.Internal;

namespace Stochastic.Chains.Estimation;

/// <summary>Decides from counts and options which moves are possible, and with what prior weight. Gathers every contradiction.</summary>
internal sealed class PossibleMoves<TState>
    where TState : notnull
{
    private const long BytesPerMove = 20; // column, count and weight

    private readonly StateSpace<TState> _states;
    private readonly CountRows _rows;
    private readonly EstimateOptions<TState> _options;
    private readonly HashSet<(int Row, int Column)> _impossible = [];
    private readonly Dictionary<int, SortedDictionary<int, double>> _priorRows = [];
    private readonly FaultCollector _faults = new();

    private PossibleMoves(StateSpace<TState> states, CountRows rows, EstimateOptions<TState> options)
    {
        _states = states;
        _rows = rows;
        _options = options;
    }

    /// <exception cref="InvalidChainException">A row is unobserved and cannot be estimated, or a move was counted that is said to be impossible.</exception>
    /// <exception cref="MemoryLimitException">A prior over all pairs of states would take too much memory.</exception>
    internal static EstimateRows Find(StateSpace<TState> states, CountRows rows, EstimateOptions<TState> options) => new PossibleMoves<TState>(states, rows, options).Find();

    private EstimateRows Find()
    {
        foreach (var (from, to) in _options.ImpossibleMoves)
        {
            _impossible.Add((_states.Require(from), _states.Require(to)));
        }

        foreach (var (from, moves) in _options.Prior?.Rows ?? [])
        {
            var row = _priorRows[_states.Require(from)] = [];
            foreach (var (to, weight) in moves)
            {
                row[_states.Require(to)] = weight;
            }
        }

        if (_options.Prior is not null && _options.UnseenMoves == UnseenMoves.Possible)
        {
            new SolveOptions().RequireMemory(_states.Count, BytesPerMove * _states.Count * _states.Count);
        }

        CheckCountedMoves();
        var (starts, possible) = (new int[_rows.RowCount + 1], new int[_rows.RowCount]);
        var (columns, counts, weights) = (new List<int>(), new List<long>(), new List<double>());
        for (var row = 0; row < _rows.RowCount; row++)
        {
            AddRow(row, columns, counts, weights);
            starts[row + 1] = columns.Count;
            possible[row] = CountPossible(row, columns.Count - starts[row]);
        }

        _faults.ThrowIfAny();
        return new EstimateRows(starts, [.. columns], [.. counts], [.. weights], possible);
    }

    private void AddRow(int row, List<int> columns, List<long> counts, List<double> weights)
    {
        var before = columns.Count;
        if (_rows.RowTotal(row) == 0 && _options.Unobserved == UnobservedStates.Absorbing)
        {
            columns.Add(row);
            counts.Add(0);
            weights.Add(0);
            return;
        }

        foreach (var (column, weight) in Candidates(row))
        {
            columns.Add(column);
            counts.Add(_rows[row, column]);
            weights.Add(weight);
        }

        if (columns.Count == before)
        {
            _faults.Add(ChainFaultKind.UnobservedRow, [_states[row]], 0, Messages.UnobservedRow(_states[row]));
        }
    }

    /// <summary>The moves of a row that have a weight, columns ascending.</summary>
    private IEnumerable<(int Column, double Weight)> Candidates(int row)
    {
        if (_options.Prior is null)
        {
            return Counted(row).Select(column => (column, 0.0));
        }

        if (_priorRows.TryGetValue(row, out var given))
        {
            return given.Where(move => !_impossible.Contains((row, move.Key))).Select(move => (move.Key, move.Value));
        }

        var columns = _options.UnseenMoves == UnseenMoves.Impossible ? Counted(row) : Enumerable.Range(0, _states.Count);
        return columns.Where(column => !_impossible.Contains((row, column))).Select(column => (column, _options.Prior.Weight));
    }

    private int[] Counted(int row) => _rows.Columns(row).ToArray();

    private int CountPossible(int row, int held)
    {
        if (_options.Prior is not null || _options.UnseenMoves == UnseenMoves.Impossible || _rows.RowTotal(row) == 0)
        {
            return held;
        }

        return _states.Count - _impossible.Count(move => move.Row == row);
    }

    private void CheckCountedMoves()
    {
        foreach (var (row, column) in _impossible.Where(move => _rows[move.Row, move.Column] > 0))
        {
            AddImpossible(row, column);
        }

        foreach (var (row, given) in _priorRows)
        {
            foreach (var column in Counted(row).Where(column => !given.ContainsKey(column)))
            {
                AddImpossible(row, column);
            }
        }
    }

    private void AddImpossible(int row, int column) => _faults.Add(
        ChainFaultKind.ImpossibleMove,
        [_states[row], _states[column]],
        _rows[row, column],
        Messages.ImpossibleMoveCounted(_states[row], _states[column], _rows[row, column]));
}
