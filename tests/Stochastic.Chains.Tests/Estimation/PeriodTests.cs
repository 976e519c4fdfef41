namespace Stochastic.Chains.Tests.Estimation;

public sealed class PeriodTests
{
    private static readonly TimeZoneInfo Utc = TimeZoneInfo.Utc;

    [Fact]
    public void The_state_at_a_boundary_is_the_last_seen_at_or_before_it()
    {
        var options = new LogOptions<string> { Period = LogPeriod.Days(1, Utc), LogEnd = Scans.At("2024-01-05") };

        // boundaries: 2 January clean, 3 January filled, 4 January filled, 5 January dirty
        var counts = Scans.Count(options, "c1 2024-01-01T08:00 clean", "c1 2024-01-02T23:59 filled", "c1 2024-01-04T08:00 dirty");

        counts.Moves().Should().Equal("clean>filled 1", "filled>filled 1", "filled>dirty 1");
        counts.Log!.FilledPeriods.Should().Be(1);
        counts.Log.Assumptions.Should().ContainSingle().Which.Should().Be(
            "the state of an item did not change between its events. Periods of 1 day, counted from 2001-01-01 in UTC; " +
            "1 boundary without an event since the one before was filled with the state last seen.");
    }

    [Fact]
    public void A_scan_on_the_boundary_itself_is_seen_there()
    {
        var options = new LogOptions<string> { Period = LogPeriod.Days(1, Utc) };

        Scans.Count(options, "c1 2024-01-01T08:00 clean", "c1 2024-01-02T00:00 filled", "c1 2024-01-03T00:00 dirty")
            .Moves().Should().Equal("filled>dirty 1");
    }

    [Fact]
    public void States_replaced_within_a_period_are_passed_over_and_reported()
    {
        var options = new LogOptions<string> { Period = LogPeriod.Days(1, Utc), LogEnd = Scans.At("2024-01-03") };

        var counts = Scans.Count(options, "c1 2024-01-01T08:00 clean", "c1 2024-01-02T08:00 filled", "c1 2024-01-02T09:00 dirty", "c1 2024-01-02T10:00 clean");

        counts.Moves().Should().Equal("clean>clean 1");
        counts.Log!.PassedOverEvents.Should().Be(2);
    }

    [Fact]
    public void An_unfinished_last_period_is_not_counted_but_reported()
    {
        string[] lines = ["c1 2024-01-01T08:00 clean", "c1 2024-01-02T08:00 filled", "c1 2024-01-03T08:00 dirty"];
        var options = new LogOptions<string> { Period = LogPeriod.Days(1, Utc) };

        var open = Scans.Count(options, lines);
        var closed = Scans.Count(options with { LogEnd = Scans.At("2024-01-04T00:00") }, lines);

        open.Moves().Should().Equal("clean>filled 1");
        open.Log!.UnfinishedPeriodEvents.Should().Be(1);
        closed.Moves().Should().Equal("clean>filled 1", "filled>dirty 1");
        closed.Log!.UnfinishedPeriodEvents.Should().Be(0);
    }

    [Fact]
    public void Nothing_is_filled_after_an_items_last_scan()
    {
        var options = new LogOptions<string> { Period = LogPeriod.Days(1, Utc), LogEnd = Scans.At("2025-01-01") };

        Scans.Count(options, "c1 2024-01-01T08:00 clean", "c1 2024-01-02T08:00 filled").Moves().Should().Equal("clean>filled 1");
    }

    [Fact]
    public void Items_are_never_joined()
    {
        var options = new LogOptions<string> { Period = LogPeriod.Days(1, Utc), LogEnd = Scans.At("2024-01-09") };

        var counts = Scans.Count(options, "c1 2024-01-01T08:00 a", "c2 2024-01-02T08:00 b", "c1 2024-01-02T09:00 a", "c2 2024-01-04T08:00 b");

        counts.Moves().Should().Equal("a>a 1", "b>b 2");
    }

    [Fact]
    public void A_day_of_23_hours_is_one_day()
    {
        // clocks in Berlin went from 02:00 to 03:00 on Sunday 31 March 2024
        var options = new LogOptions<string> { Period = LogPeriod.Days(1, Scans.Berlin), LogEnd = Scans.At("2024-04-02T00:00+02:00") };

        var counts = Scans.Count(
            options,
            "c1 2024-03-30T23:30+01:00 a",   // still Saturday
            "c1 2024-03-31T00:10+01:00 b",   // Sunday
            "c1 2024-03-31T23:50+02:00 c",   // still Sunday, 22 h 40 min later
            "c1 2024-04-01T00:10+02:00 d");  // Monday

        counts.Moves().Should().Equal("a>c 1", "c>d 1");
        counts.Log!.PassedOverEvents.Should().Be(1);
    }

    [Fact]
    public void A_day_of_25_hours_is_one_day()
    {
        // clocks in Berlin went from 03:00 back to 02:00 on Sunday 27 October 2024
        var options = new LogOptions<string> { Period = LogPeriod.Days(1, Scans.Berlin), LogEnd = Scans.At("2024-10-29T00:00+01:00") };

        var counts = Scans.Count(
            options,
            "c1 2024-10-26T23:50+02:00 a",   // Saturday
            "c1 2024-10-27T00:05+02:00 b",   // Sunday
            "c1 2024-10-27T23:55+01:00 c",   // still Sunday, 24 h 50 min later
            "c1 2024-10-28T00:05+01:00 d");  // Monday

        counts.Moves().Should().Equal("a>c 1", "c>d 1");
    }

    [Theory]
    [InlineData("2024-03-30", "2024-04-02", 3)]
    [InlineData("2024-10-26", "2024-10-29", 3)]
    [InlineData("2024-01-01", "2025-01-01", 366)]
    public void Local_midnights_are_one_day_apart_across_clock_changes(string from, string to, int days)
    {
        var (first, last) = (LocalMidnight(from), LocalMidnight(to));
        var options = new LogOptions<string> { Period = LogPeriod.Days(1, Scans.Berlin) };

        var counts = TransitionCounts.FromEvents([new LogEvent<int, string>(1, first, "a"), new LogEvent<int, string>(1, last, "a")], options);

        counts["a", "a"].Should().Be(days);
    }

    [Fact]
    public void Elapsed_hours_pay_no_heed_to_clock_changes()
    {
        var (first, last) = (LocalMidnight("2024-03-31"), LocalMidnight("2024-04-01"));
        LogEvent<int, string>[] events = [new(1, first, "a"), new(1, last, "a")];

        TransitionCounts.FromEvents(events, new LogOptions<string> { Period = LogPeriod.Every(TimeSpan.FromHours(1), Scans.Berlin) })["a", "a"].Should().Be(23);
    }

    [Fact]
    public void Shifts_of_eight_hours_begin_at_local_midnight()
    {
        var options = new LogOptions<string> { Period = LogPeriod.Every(TimeSpan.FromHours(8), Scans.Berlin), LogEnd = Scans.At("2024-01-02T08:00+01:00") };

        Scans.Count(options, "c1 2024-01-01T07:59+01:00 a", "c1 2024-01-01T08:00+01:00 b", "c1 2024-01-02T00:01+01:00 c")
            .Moves().Should().Equal("b>b 2", "b>c 1");
    }

    [Fact]
    public void Months_begin_on_the_first_and_have_any_length()
    {
        var options = new LogOptions<string> { Period = LogPeriod.Months(1, Scans.Berlin), LogEnd = Scans.At("2024-05-01T00:00+02:00") };

        // boundaries: 1 February a, 1 March b (a leap day between), 1 April c, 1 May d
        var counts = Scans.Count(
            options, "c1 2024-01-31T23:59+01:00 a", "c1 2024-02-29T23:59+01:00 b", "c1 2024-03-31T23:59+02:00 c", "c1 2024-04-01T00:01+02:00 d");

        counts.Moves().Should().Equal("a>b 1", "b>c 1", "c>d 1");
    }

    [Fact]
    public void Weeks_begin_on_mondays_unless_anchored_elsewhere()
    {
        string[] lines = ["c1 2024-01-06T12:00 a", "c1 2024-01-07T12:00 b", "c1 2024-01-14T12:00 c"]; // Saturday, Sunday, Sunday
        var week = LogPeriod.Weeks(1, Utc);
        var end = Scans.At("2024-01-21");

        Scans.Count(new LogOptions<string> { Period = week, LogEnd = end }, lines).Moves().Should().Equal("b>c 1");
        Scans.Count(new LogOptions<string> { Period = week with { Anchor = new DateOnly(2023, 12, 31) }, LogEnd = end }, lines)
            .Moves().Should().Equal("a>b 1", "b>c 1");
    }

    [Fact]
    public void A_log_shorter_than_a_period_counts_no_move_and_says_so()
    {
        var counts = Scans.Count(new LogOptions<string> { Period = LogPeriod.Months(1, Utc) }, "c1 2024-01-02T12:00 a", "c1 2024-01-03T12:00 b");

        counts.TotalCount.Should().Be(0);
        counts.Log!.UnfinishedPeriodEvents.Should().Be(2);
    }

    [Fact]
    public void Periods_are_told_in_words()
    {
        LogPeriod.Days(1, Utc).ToString().Should().Be("1 day, counted from 2001-01-01 in UTC");
        LogPeriod.Weeks(2, Utc).ToString().Should().Be("2 weeks, counted from 2001-01-01 in UTC");
        (LogPeriod.Months(12, Scans.Berlin) with { Anchor = new DateOnly(2024, 1, 31) }).ToString().Should().Be("12 months, counted from 2024-01-31 in Europe/Berlin");
        LogPeriod.Every(TimeSpan.FromMinutes(90), Utc).ToString().Should().Be("90 minutes, counted from 2001-01-01 in UTC");
        LogPeriod.Every(TimeSpan.FromMilliseconds(1500), Utc).ToString().Should().Be("00:00:01.5000000, counted from 2001-01-01 in UTC");
        LogPeriod.Every(TimeSpan.FromSeconds(1), Utc).ToString().Should().StartWith("1 second,");
        LogPeriod.Every(TimeSpan.FromHours(1), Utc).ToString().Should().StartWith("1 hour,");
    }

    [Fact]
    public void Periods_that_are_not_longer_than_zero_are_refused()
    {
        foreach (var act in new Func<LogPeriod>[]
        {
            () => LogPeriod.Every(TimeSpan.Zero, Utc), () => LogPeriod.Days(0, Utc), () => LogPeriod.Weeks(-1, Utc), () => LogPeriod.Months(0, Utc),
        })
        {
            act.Should().Throw<ArgumentOutOfRangeException>().WithMessage("A period must be longer than zero.*");
        }

        FluentActions.Invoking(() => LogPeriod.Days(1, null!)).Should().Throw<ArgumentNullException>();
    }

    private static DateTimeOffset LocalMidnight(string date)
    {
        var local = DateTime.Parse(date, System.Globalization.CultureInfo.InvariantCulture);
        return new DateTimeOffset(local, Scans.Berlin.GetUtcOffset(local));
    }
}
