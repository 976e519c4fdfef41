namespace Stochastic.Chains.Estimation;

/// <summary>The period boundaries within a log, numbered from 0 for the first at or after its first event.</summary>
internal sealed class PeriodGrid
{
    private readonly long[]? _boundaries; // calendar periods: the UTC ticks of each
    private readonly long _first;         // elapsed periods: the UTC ticks of the first,
    private readonly long _length;        // and the distance to the next

    /// <summary>Lays the boundaries from the first event to the end of the log, both in UTC ticks.</summary>
    internal PeriodGrid(LogPeriod period, long firstEvent, long logEnd)
    {
        if (period.Unit == LogPeriodUnit.Elapsed)
        {
            _length = period.Length.Ticks;
            _first = firstEvent + RemainderToNext(firstEvent - LocalTime.StartOfDay(period.Anchor, period.TimeZone), _length);
            Count = logEnd < _first ? 0 : ((logEnd - _first) / _length) + 1;
        }
        else
        {
            _boundaries = CalendarBoundaries.Between(period, firstEvent, logEnd);
            Count = _boundaries.Length;
        }
    }

    /// <summary>The number of boundaries that the log covers.</summary>
    internal long Count { get; }

    /// <summary>The number of the first boundary at or after an instant of the log; <see cref="Count"/> or more where the log covers none.</summary>
    internal long FirstAtOrAfter(long ticks)
    {
        if (_boundaries is null)
        {
            return ticks <= _first ? 0 : ((ticks - _first - 1) / _length) + 1;
        }

        var found = Array.BinarySearch(_boundaries, ticks);
        return found >= 0 ? found : ~found;
    }

    /// <summary>The number of the first boundary after an instant of the log.</summary>
    internal long FirstAfter(long ticks) => FirstAtOrAfter(ticks + 1);

    private static long RemainderToNext(long distance, long length)
    {
        var past = ((distance % length) + length) % length;
        return past == 0 ? 0 : length - past;
    }
}
