namespace Stochastic.Chains.Estimation;

/// <summary>The instants at which days, weeks and months begin in a time zone.</summary>
internal static class CalendarBoundaries
{
    private const int DaysInWeek = 7;
    private const int MonthsInYear = 12;

    /// <summary>The boundaries of calendar periods from one instant to another, both included, ascending, in UTC ticks.</summary>
    internal static long[] Between(LogPeriod period, long first, long last)
    {
        var boundaries = new List<long>();
        var previous = first - 1;
        for (var step = StepBefore(period, first); Date(period, step) is { } date; step++)
        {
            var boundary = LocalTime.StartOfDay(date, period.TimeZone);
            if (boundary > last)
            {
                break;
            }

            if (boundary > previous) // a date that the zone skipped as a whole begins with the next and is no period
            {
                boundaries.Add(boundary);
                previous = boundary;
            }
        }

        return [.. boundaries];
    }

    /// <summary>A step from the anchor whose date lies before the instant, or the first date there is.</summary>
    private static long StepBefore(LogPeriod period, long ticks)
    {
        var date = DateOnly.FromDateTime(new DateTime(Math.Max(ticks, 0)));
        var distance = period.Unit == LogPeriodUnit.Months
            ? MonthNumber(date) - MonthNumber(period.Anchor)
            : date.DayNumber - period.Anchor.DayNumber;
        var step = (distance / StepLength(period)) - 3; // the division rounds up below zero, and the zone may be a day ahead
        while (Date(period, step) is null)
        {
            step++;
        }

        return step;
    }

    /// <summary>The date a number of steps from the anchor; null outside the years 1 to 9999.</summary>
    private static DateOnly? Date(LogPeriod period, long step)
    {
        if (period.Unit != LogPeriodUnit.Months)
        {
            var day = period.Anchor.DayNumber + (step * StepLength(period));
            return day >= 0 && day <= DateOnly.MaxValue.DayNumber ? DateOnly.FromDayNumber((int)day) : null;
        }

        var month = MonthNumber(period.Anchor) + (step * StepLength(period));
        var year = month / MonthsInYear;
        if (year < DateOnly.MinValue.Year || year > DateOnly.MaxValue.Year)
        {
            return null;
        }

        var monthOfYear = (int)(month % MonthsInYear) + 1;
        return new DateOnly((int)year, monthOfYear, Math.Min(period.Anchor.Day, DateTime.DaysInMonth((int)year, monthOfYear)));
    }

    private static long StepLength(LogPeriod period) => period.Unit == LogPeriodUnit.Weeks ? (long)period.Count * DaysInWeek : period.Count;

    private static long MonthNumber(DateOnly date) => ((long)date.Year * MonthsInYear) + date.Month - 1;
}
