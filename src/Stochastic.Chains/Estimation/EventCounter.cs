using Stochastic.Chains.Internal;

namespace Stochastic.Chains.Estimation;

/// <summary>Reads the events of a log one by one, in any order, then counts the moves of each item.</summary>
internal sealed class EventCounter<TItem, TState>
    where TItem : notnull
    where TState : notnull
{
    private const int ReadsPerReport = 1 << 16;
    private const int ItemsPerReport = 1 << 12;

    private readonly LogOptions<TState> _options;
    private readonly LogFaultCollector _faults;
    private readonly StateLookup<TState> _states;
    private readonly Func<double> _fractionRead;
    private readonly ScanLog<TItem> _scans = new();
    private long _read;
    private bool _hasLines;
    private DateTimeOffset _first = DateTimeOffset.MaxValue;
    private DateTimeOffset _last = DateTimeOffset.MinValue;

    /// <summary>Starts with no events.</summary>
    /// <param name="options">How the log is counted.</param>
    /// <param name="faults">Where faults are gathered; the caller throws them.</param>
    /// <param name="fractionRead">The part of the log that has been read, for progress.</param>
    /// <exception cref="InvalidChainException">The list of states has faults, or lacks a state that the options name.</exception>
    internal EventCounter(LogOptions<TState> options, LogFaultCollector faults, Func<double> fractionRead)
    {
        _options = options;
        _faults = faults;
        _fractionRead = fractionRead;
        _states = LogStates.Lookup(options);
    }

    /// <summary>The number of events read so far.</summary>
    internal long Read => _read;

    internal void Add(in LogEvent<TItem, TState> entry)
    {
        _options.CancellationToken.ThrowIfCancellationRequested();
        if (_read++ % ReadsPerReport == 0)
        {
            _options.Progress?.Report(new SolveProgress("reading events", _fractionRead()));
        }

        _hasLines |= entry.Line > 0;
        var number = entry.Line > 0 ? entry.Line : _read;
        if (entry.Item is null)
        {
            _faults.Add(LogFaultKind.EmptyItem, [number], Messages.NullItem(Place(number)));
        }

        if (entry.State is null)
        {
            _faults.Add(LogFaultKind.EmptyState, [number], Messages.NullStateInEvent(Place(number)));
        }

        if (_options.LogEnd is { } end && entry.Time > end)
        {
            _faults.Add(LogFaultKind.AfterLogEnd, [number], Messages.AfterLogEnd(Place(number), entry.Time, end));
        }

        if (entry.Item is not null && entry.State is not null)
        {
            AddScan(entry, number);
        }
    }

    /// <summary>Counts what was read. Throws where there were faults, those of other readers of the log included.</summary>
    /// <exception cref="EventLogException">There are faults; all are listed.</exception>
    internal TransitionCounts<TState> Count()
    {
        if (_read == 0 && !_faults.HasFaults)
        {
            _faults.Add(LogFaultKind.EmptyLog, [], Messages.EmptyLog);
        }

        if (_scans.Count == 0)
        {
            _faults.ThrowIfAny();
        }

        _options.Progress?.Report(new SolveProgress("reading events", 1));
        var silence = LogStates.Silence(_options, _states);
        var end = _options.LogEnd ?? _last;
        var grid = _options.Period is { } period && !_faults.HasFaults ? new PeriodGrid(period, _first.UtcTicks, end.UtcTicks) : null;
        var moves = new MoveCounter(_options.KeepsHistory ? new PathRecorder() : null);
        var tally = new LogTally(_states.Count);
        var histories = new HistoryCounter(grid, silence, end.UtcTicks, moves, tally);
        for (var item = 0; item < _scans.ItemCount; item++)
        {
            if (item % ItemsPerReport == 0)
            {
                _options.CancellationToken.ThrowIfCancellationRequested();
                _options.Progress?.Report(new SolveProgress("counting moves", (double)item / _scans.ItemCount));
            }

            histories.Count(OnePerInstant(item, tally));
        }

        _faults.ThrowIfAny();
        _options.Progress?.Report(new SolveProgress("counting moves", 1));
        var states = _states.ToStateSpace();
        var rows = moves.ToRows(states.Count);
        return new TransitionCounts<TState>(states, rows, _scans.ItemCount, Report(states, rows, tally, end)) { History = PathHistories.Of(states, moves) };
    }

    private void AddScan(in LogEvent<TItem, TState> entry, long number)
    {
        var state = _states.Locate(entry.State);
        if (state < 0)
        {
            _faults.Add(LogFaultKind.UnknownState, [number], Messages.UnknownStateInEvent(Place(number), entry.State, entry.Item));
            return;
        }

        _first = entry.Time < _first ? entry.Time : _first;
        _last = entry.Time > _last ? entry.Time : _last;
        _scans.Add(entry.Item, entry.Time.UtcTicks, state, number);
    }

    /// <summary>The history of an item without duplicates; two states at one instant are faults.</summary>
    private ReadOnlySpan<Scan> OnePerInstant(int item, LogTally tally)
    {
        var history = _scans.History(item);
        var kept = 1;
        foreach (var scan in history[1..])
        {
            ref var before = ref history[kept - 1];
            if (scan.Ticks != before.Ticks)
            {
                history[kept++] = scan;
            }
            else if (scan.State == before.State)
            {
                tally.DuplicateEvents++;
            }
            else
            {
                var time = new DateTimeOffset(scan.Ticks, TimeSpan.Zero);
                var message = Messages.TwoStates(
                    _scans.Item(item), time, (_states[before.State], Place(before.Number)), (_states[scan.State], Place(scan.Number)));
                _faults.Add(LogFaultKind.TwoStatesAtOneInstant, [before.Number, scan.Number], message);
            }
        }

        return history[..kept];
    }

    private string Place(long number) => Messages.LogPlace(_hasLines, number);

    private LogReport<TState> Report(StateSpace<TState> states, CountRows rows, LogTally tally, DateTimeOffset end) => new()
    {
        Events = _read,
        Items = _scans.ItemCount,
        FirstTime = _first,
        LastTime = _last,
        LogEnd = end,
        Moves = rows.Total,
        DuplicateEvents = tally.DuplicateEvents,
        SingleEventItems = tally.SingleEventItems,
        OpenItems = tally.OpenItems.Sum(),
        OpenItemsByState = Enumerable.Range(0, states.Count).Where(state => tally.OpenItems[state] > 0)
            .ToDictionary(state => states[state], state => tally.OpenItems[state], states.Comparer).AsReadOnly(),
        SilentItems = tally.SilentItems,
        FinishedItems = tally.FinishedItems,
        ReturnsAfterSilence = tally.Returns,
        FilledPeriods = tally.FilledPeriods,
        PassedOverEvents = tally.PassedOverEvents,
        UnfinishedPeriodEvents = tally.UnfinishedPeriodEvents,
        Assumptions = LogStates.Assumptions(_options, tally),
    };
}
