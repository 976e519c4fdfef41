namespace Stochastic.Chains.Estimation;

/// <summary>Counts the moves of one item between period boundaries: at each it is in the last state seen at or before it.</summary>
internal struct BoundaryCounter(PeriodGrid periods, MoveCounter moves, LogTally tally)
{
    private const int None = -1;

    private long _boundary = None;   // the boundary last given a state,
    private int _state = None;       // that state, which a later event of the same period may still replace,
    private int _stateBefore = None; // and the state one boundary earlier

    internal void Count(ReadOnlySpan<Scan> history, Silence silence, long logEnd)
    {
        for (var k = 0; k < history.Length; k++)
        {
            TakeScan(history[k]);
            if (k + 1 < history.Length && silence.IsSilent(history[k], history[k + 1].Ticks))
            {
                tally.Returns++;
                var silent = SilentFrom(history[k], silence);
                if (silence.CountsReturns && silent < periods.FirstAtOrAfter(history[k + 1].Ticks))
                {
                    Take(silent, silence.MovesTo);
                }
            }
        }

        TakeEnd(history[^1], silence, logEnd);
        Close();
    }

    /// <summary>The first boundary at which silence has lasted long enough, with at least one before it in the state last seen.</summary>
    private readonly long SilentFrom(Scan scan, Silence silence) =>
        Math.Max(periods.FirstAfter(scan.Ticks + silence.After), periods.FirstAtOrAfter(scan.Ticks) + 1);

    private void TakeScan(Scan scan)
    {
        var boundary = periods.FirstAtOrAfter(scan.Ticks);
        if (boundary >= periods.Count)
        {
            tally.UnfinishedPeriodEvents++;
            FillToLastBoundary();
            return;
        }

        if (boundary == _boundary)
        {
            tally.PassedOverEvents++;
        }

        Take(boundary, scan.State);
    }

    /// <summary>Up to an event after the last boundary the item is where it was, at that boundary too.</summary>
    private void FillToLastBoundary()
    {
        if (_boundary != None && _boundary < periods.Count - 1)
        {
            Take(periods.Count - 1, _state);
            tally.FilledPeriods++;
        }
    }

    private void TakeEnd(Scan last, Silence silence, long logEnd)
    {
        if (silence.IsFinal(last.State))
        {
            tally.FinishedItems++;
            return;
        }

        if (silence.IsSilent(last, logEnd) && SilentFrom(last, silence) is var silent && silent < periods.Count)
        {
            tally.SilentItems++;
            Take(silent, silence.MovesTo);
        }
        else
        {
            tally.OpenItems[last.State]++;
        }
    }

    /// <summary>Puts the item into a state from a boundary on; boundaries come in ascending order.</summary>
    private void Take(long boundary, int state)
    {
        if (boundary != _boundary && _boundary != None)
        {
            Close();
            var filled = boundary - _boundary - 1;
            moves.Add(_state, _state, filled);
            tally.FilledPeriods += filled;
            _stateBefore = _state;
        }

        _boundary = boundary;
        _state = state;
    }

    /// <summary>Counts the move to the boundary last given a state, which is final now.</summary>
    private readonly void Close()
    {
        if (_stateBefore != None)
        {
            moves.Add(_stateBefore, _state);
        }
    }
}
