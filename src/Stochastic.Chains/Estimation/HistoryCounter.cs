namespace Stochastic.Chains.Estimation;

/// <summary>Counts the moves in the history of one item after another.</summary>
internal sealed class HistoryCounter(PeriodGrid? periods, Silence silence, long logEnd, MoveCounter moves, LogTally tally)
{
    /// <summary>Counts one item: its events by time, no two at one instant, at least one.</summary>
    internal void Count(ReadOnlySpan<Scan> history)
    {
        moves.StartPath();
        if (history.Length == 1)
        {
            tally.SingleEventItems++;
        }

        if (periods is null)
        {
            CountEvents(history);
        }
        else
        {
            new BoundaryCounter(periods, moves, tally).Count(history, silence, logEnd);
        }
    }

    private void CountEvents(ReadOnlySpan<Scan> history)
    {
        for (var k = 1; k < history.Length; k++)
        {
            var (before, after) = (history[k - 1], history[k]);
            if (silence.IsSilent(before, after.Ticks))
            {
                tally.Returns++;
                if (silence.CountsReturns)
                {
                    moves.Add(before.State, silence.MovesTo);
                    moves.Add(silence.MovesTo, after.State);
                    continue;
                }
            }

            moves.Add(before.State, after.State);
        }

        var last = history[^1];
        if (silence.IsFinal(last.State))
        {
            tally.FinishedItems++;
        }
        else if (silence.IsSilent(last, logEnd))
        {
            tally.SilentItems++;
            moves.Add(last.State, silence.MovesTo);
        }
        else
        {
            tally.OpenItems[last.State]++;
        }
    }
}
