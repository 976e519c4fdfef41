using System.Globalization;
using Stochastic.Chains.Internal;

namespace Stochastic.Chains;

/// <summary>A fixed step through a log: an endless row of periods, whose boundaries follow the calendar of a time zone.</summary>
/// <remarks>
/// <para>
/// An item's state at a boundary is the last one seen at or before it: the assumption is that the state did not change between
/// scans. One move is counted between each two consecutive boundaries, from the first boundary at or after the item's first event to the
/// first at or after its last, but never past the end of the log. So the state of a period is the last one seen in it, states that
/// were replaced within one period are passed over, and a last period that the log does not complete is not counted; the report of the log counts all three.
/// </para>
/// <para>
/// Days, weeks and months begin at local midnight, so a day on which clocks change is one day all the same. Where midnight does not
/// exist because clocks skip it, the day begins with its first instant; where midnight comes twice, with the earlier. A month after the 31st is the
/// last day of the month, always counted from <see cref="Anchor"/>: 31 January, 28 February, 31 March.
/// </para>
/// </remarks>
/// <example>
/// <code>
/// var berlin = TimeZoneInfo.FindSystemTimeZoneById("Europe/Berlin");
/// LogPeriod month = LogPeriod.Months(1, berlin);
/// LogPeriod monthEnd = month with { Anchor = new DateOnly(2024, 1, 31) };
/// LogPeriod shift = LogPeriod.Every(TimeSpan.FromHours(8), berlin);
/// </code>
/// </example>
public sealed record LogPeriod
{
    private LogPeriod(LogPeriodUnit unit, int count, TimeSpan length, TimeZoneInfo timeZone)
    {
        ArgumentNullException.ThrowIfNull(timeZone);
        Unit = unit;
        Count = count;
        Length = length;
        TimeZone = timeZone;
    }

    /// <summary>Gets what the periods are counted in.</summary>
    public LogPeriodUnit Unit { get; }

    /// <summary>Gets the number of days, weeks or months in a period; 1 for a length of elapsed time.</summary>
    public int Count { get; }

    /// <summary>Gets the elapsed time of a period; zero for calendar periods, whose length varies.</summary>
    public TimeSpan Length { get; }

    /// <summary>Gets the time zone whose midnight begins a day.</summary>
    public TimeZoneInfo TimeZone { get; }

    /// <summary>
    /// Gets the date on which some period begins, at its local midnight; the others follow from it in both directions. Default:
    /// 1 January 2001, a Monday, so that weeks begin on Mondays and months on the first.
    /// </summary>
    public DateOnly Anchor { get; init; } = new(2001, 1, 1);

    /// <summary>Periods of a fixed elapsed time, such as 15 minutes or 8 hours.</summary>
    /// <param name="length">The length of a period, above zero.</param>
    /// <param name="timeZone">The time zone in whose midnight the <see cref="Anchor"/> begins.</param>
    /// <exception cref="ArgumentOutOfRangeException">The length is not above zero.</exception>
    public static LogPeriod Every(TimeSpan length, TimeZoneInfo timeZone) => length > TimeSpan.Zero
        ? new LogPeriod(LogPeriodUnit.Elapsed, 1, length, timeZone)
        : throw new ArgumentOutOfRangeException(nameof(length), length, Messages.PeriodNotPositive);

    /// <summary>Periods of calendar days.</summary>
    /// <param name="count">The number of days in a period, 1 or more.</param>
    /// <param name="timeZone">The time zone whose midnight begins a day.</param>
    /// <exception cref="ArgumentOutOfRangeException">The count is below 1.</exception>
    public static LogPeriod Days(int count, TimeZoneInfo timeZone) => Calendar(LogPeriodUnit.Days, count, timeZone);

    /// <summary>Periods of calendar weeks, beginning on Mondays unless another <see cref="Anchor"/> is given.</summary>
    /// <param name="count">The number of weeks in a period, 1 or more.</param>
    /// <param name="timeZone">The time zone whose midnight begins a day.</param>
    /// <exception cref="ArgumentOutOfRangeException">The count is below 1.</exception>
    public static LogPeriod Weeks(int count, TimeZoneInfo timeZone) => Calendar(LogPeriodUnit.Weeks, count, timeZone);

    /// <summary>Periods of calendar months, beginning on the first unless another <see cref="Anchor"/> is given.</summary>
    /// <param name="count">The number of months in a period, 1 or more; 12 for years.</param>
    /// <param name="timeZone">The time zone whose midnight begins a day.</param>
    /// <exception cref="ArgumentOutOfRangeException">The count is below 1.</exception>
    public static LogPeriod Months(int count, TimeZoneInfo timeZone) => Calendar(LogPeriodUnit.Months, count, timeZone);

    /// <summary>The period in words, the same in every culture.</summary>
    public override string ToString()
    {
        var length = Unit switch
        {
            LogPeriodUnit.Days => Text.Count(Count, "day", "days"),
            LogPeriodUnit.Weeks => Text.Count(Count, "week", "weeks"),
            LogPeriodUnit.Months => Text.Count(Count, "month", "months"),
            _ => LogText.Span(Length),
        };
        return $"{length}, counted from {Anchor.ToString("yyyy-MM-dd", CultureInfo.InvariantCulture)} in {TimeZone.Id}";
    }

    private static LogPeriod Calendar(LogPeriodUnit unit, int count, TimeZoneInfo timeZone) => count >= 1
        ? new LogPeriod(unit, count, TimeSpan.Zero, timeZone)
        : throw new ArgumentOutOfRangeException(nameof(count), count, Messages.PeriodNotPositive);
}
