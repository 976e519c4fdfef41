using System.Globalization;
using Stochastic.Chains.Estimation;

namespace Stochastic.Chains.Tests.Estimation;

public sealed class CalendarBoundariesTests
{
    [Fact]
    public void A_month_after_the_31st_is_the_last_of_the_month_and_never_drifts() =>
        Boundaries(LogPeriod.Months(1, TimeZoneInfo.Utc) with { Anchor = new DateOnly(2024, 1, 31) }, "2024-01-31", "2025-03-31").Should().Equal(
            "2024-01-31", "2024-02-29", "2024-03-31", "2024-04-30", "2024-05-31", "2024-06-30", "2024-07-31", "2024-08-31",
            "2024-09-30", "2024-10-31", "2024-11-30", "2024-12-31", "2025-01-31", "2025-02-28", "2025-03-31");

    [Fact]
    public void Boundaries_before_the_anchor_follow_from_it_as_well() =>
        Boundaries(LogPeriod.Months(3, TimeZoneInfo.Utc) with { Anchor = new DateOnly(2024, 5, 31) }, "2023-01-01", "2024-05-31").Should().Equal(
            "2023-02-28", "2023-05-31", "2023-08-31", "2023-11-30", "2024-02-29", "2024-05-31");

    [Fact]
    public void Leap_days_as_anchor_of_years_fall_on_the_28th_between() =>
        Boundaries(LogPeriod.Months(12, TimeZoneInfo.Utc) with { Anchor = new DateOnly(2024, 2, 29) }, "2022-01-01", "2025-12-31").Should().Equal(
            "2022-02-28", "2023-02-28", "2024-02-29", "2025-02-28");

    [Fact]
    public void Weeks_before_the_anchor_begin_on_mondays_too() =>
        Boundaries(LogPeriod.Weeks(1, TimeZoneInfo.Utc), "1999-12-30", "2000-01-11").Should().Equal("2000-01-03", "2000-01-10");

    [Fact]
    public void Days_in_berlin_are_23_and_25_hours_long_when_clocks_change()
    {
        var spring = CalendarBoundaries.Between(LogPeriod.Days(1, Scans.Berlin), Ticks("2024-03-31T00:00+01:00"), Ticks("2024-04-01T00:00+02:00"));
        var autumn = CalendarBoundaries.Between(LogPeriod.Days(1, Scans.Berlin), Ticks("2024-10-27T00:00+02:00"), Ticks("2024-10-28T00:00+01:00"));

        (spring[1] - spring[0]).Should().Be(TimeSpan.FromHours(23).Ticks);
        (autumn[1] - autumn[0]).Should().Be(TimeSpan.FromHours(25).Ticks);
    }

    [Fact]
    public void A_date_that_a_zone_skipped_is_no_period()
    {
        // Samoa had no 30 December 2011 (IANA time zone database): midnight ending the 29th began the 31st
        var zone = TimeZoneInfo.FindSystemTimeZoneById("Pacific/Apia");

        var days = CalendarBoundaries.Between(LogPeriod.Days(1, zone), Ticks("2011-12-29T00:00-10:00"), Ticks("2012-01-01T00:00+14:00"));

        days.Should().Equal(Ticks("2011-12-29T00:00-10:00"), Ticks("2011-12-31T00:00+14:00"), Ticks("2012-01-01T00:00+14:00"));
    }

    [Fact]
    public void The_first_and_last_years_there_are_have_boundaries()
    {
        var years = LogPeriod.Months(12, TimeZoneInfo.Utc);

        CalendarBoundaries.Between(years, DateTime.MinValue.Ticks, Ticks("0002-06-01")).Should().HaveCount(2);
        CalendarBoundaries.Between(years, Ticks("9998-06-01"), DateTime.MaxValue.Ticks).Should().HaveCount(1);
        CalendarBoundaries.Between(LogPeriod.Days(1, Scans.Berlin), DateTime.MinValue.Ticks, Ticks("0001-01-03")).Should().HaveCount(2);
    }

    [Theory]
    [InlineData(7)]
    [InlineData(8)]
    public void Elapsed_boundaries_number_every_instant_as_a_search_does(int seed)
    {
        var seeded = new Random(seed);
        for (var trial = 0; trial < 50; trial++)
        {
            var anchor = new DateOnly(2001, 1, 1).DayNumber * TimeSpan.TicksPerDay;
            var length = seeded.NextInt64(1, 50);
            var first = anchor + seeded.NextInt64(-500, 500);
            var end = first + seeded.NextInt64(0, 400);
            var grid = new PeriodGrid(LogPeriod.Every(new TimeSpan(length), TimeZoneInfo.Utc), first, end);
            long[] boundaries = [.. Enumerable.Range(-1200, 3600).Select(k => anchor + (k * length)).Where(at => at >= first && at <= end)];

            grid.Count.Should().Be(boundaries.Length);
            for (var at = first; at <= end; at++)
            {
                Math.Min(grid.FirstAtOrAfter(at), grid.Count).Should().Be(boundaries.Count(boundary => boundary < at));
                Math.Min(grid.FirstAfter(at), grid.Count).Should().Be(boundaries.Count(boundary => boundary <= at));
            }
        }
    }

    private static IEnumerable<string> Boundaries(LogPeriod period, string from, string to) =>
        CalendarBoundaries.Between(period, Ticks(from), Ticks(to)).Select(ticks => new DateTime(ticks).ToString("yyyy-MM-dd", CultureInfo.InvariantCulture));

    private static long Ticks(string time) => Scans.At(time).UtcTicks;
}
