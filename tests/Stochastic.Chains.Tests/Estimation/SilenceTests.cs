namespace Stochastic.Chains.Tests.Estimation;

public sealed class SilenceTests
{
    private static readonly LogOptions<string> TenDays = new() { Silence = new SilenceRule<string>(TimeSpan.FromDays(10), "lost") };
    private static readonly LogOptions<string> Returns = new() { Silence = new SilenceRule<string>(TimeSpan.FromDays(10), "lost") { CountsReturns = true } };
    private static readonly string[] GoneAndBack = ["c1 2024-01-01T08:00 clean", "c1 2024-02-01T08:00 filled", "c1 2024-02-02T08:00 dirty"];

    [Fact]
    public void An_item_unseen_for_longer_than_the_span_moves_once_to_the_named_state()
    {
        var counts = Scans.Count(TenDays, "c1 2024-01-01T08:00 clean", "c1 2024-01-02T08:00 filled", "c2 2024-03-01T08:00 clean");

        counts.Moves().Should().Equal("clean>filled 1", "filled>lost 1");
        counts.NeverLeftStates.Should().Equal("lost");
        counts.Log!.SilentItems.Should().Be(1);
        counts.Log.OpenItems.Should().Be(1);
        counts.Log.OpenItemsByState.Should().ContainKey("clean").And.HaveCount(1);
    }

    [Fact]
    public void Without_a_rule_silence_means_nothing()
    {
        var counts = Scans.Count(new LogOptions<string>(), "c1 2024-01-01T08:00 clean", "c1 2024-01-02T08:00 filled", "c2 2034-03-01T08:00 clean");

        counts.Moves().Should().Equal("clean>filled 1");
        counts.Log!.OpenItems.Should().Be(2);
    }

    [Theory]
    [InlineData("2024-01-11T08:00:00", 0)]
    [InlineData("2024-01-11T08:00:01", 1)]
    public void Exactly_the_span_is_not_silent_and_anything_longer_is(string end, int silent)
    {
        var counts = Scans.Count(TenDays with { LogEnd = Scans.At(end) }, "c1 2024-01-01T08:00 clean");

        counts.Log!.SilentItems.Should().Be(silent);
        counts.Log.OpenItems.Should().Be(1 - silent);
        counts.TotalCount.Should().Be(silent);
    }

    [Fact]
    public void Silence_is_measured_to_the_given_end_of_the_log()
    {
        string[] lines = ["c1 2024-01-01T08:00 clean"];

        Scans.Count(TenDays, lines).Log!.SilentItems.Should().Be(0);
        Scans.Count(TenDays with { LogEnd = Scans.At("2024-06-01") }, lines).Log!.SilentItems.Should().Be(1);
    }

    [Fact]
    public void Items_last_seen_in_the_named_state_or_a_final_one_are_finished_not_silent()
    {
        var options = TenDays with { FinalStates = ["scrapped"] };

        var counts = Scans.Count(
            options,
            "c1 2024-01-01T08:00 clean", "c1 2024-01-02T08:00 lost",
            "c2 2024-01-01T08:00 clean", "c2 2024-01-02T08:00 scrapped",
            "c3 2024-03-01T08:00 clean");

        counts.Moves().Should().Equal("clean>lost 1", "clean>scrapped 1");
        (counts.Log!.FinishedItems, counts.Log.SilentItems, counts.Log.OpenItems).Should().Be((2L, 0L, 1L));
    }

    [Fact]
    public void The_named_state_is_a_state_even_when_nothing_is_silent() =>
        Scans.Count(TenDays, "c1 2024-01-01T08:00 clean").States.Should().Equal("clean", "lost");

    [Fact]
    public void An_item_that_comes_back_was_never_gone_but_is_reported()
    {
        var counts = Scans.Count(TenDays, GoneAndBack);

        counts.Moves().Should().Equal("clean>filled 1", "filled>dirty 1");
        counts.Log!.ReturnsAfterSilence.Should().Be(1);
        counts.Log.Assumptions.Should().Contain("an item that came back after such a silence was never in 'lost'; 1 return was seen.");
    }

    [Fact]
    public void On_request_an_item_that_comes_back_was_gone_meanwhile()
    {
        var counts = Scans.Count(Returns, GoneAndBack);

        counts.Moves().Should().Equal("clean>lost 1", "filled>dirty 1", "lost>filled 1");
        counts.Log!.ReturnsAfterSilence.Should().Be(1);
        counts.Log.SilentItems.Should().Be(0, "this counts the ends of histories");
        counts.Log.Assumptions.Should().Contain("an item that came back after such a silence was in 'lost' meanwhile; 1 return was seen.");
    }

    [Fact]
    public void A_long_stay_in_a_final_state_is_no_silence()
    {
        var options = Returns with { FinalStates = ["in store"] };
        var events = new[] { ("2024-01-01", "in store"), ("2024-03-01", "filled") }
            .Select(seen => new LogEvent<int, string>(1, Scans.At(seen.Item1), seen.Item2));

        var counts = TransitionCounts.FromEvents(events, options);

        counts["in store", "filled"].Should().Be(1);
        counts.Log!.ReturnsAfterSilence.Should().Be(0);
    }

    [Fact]
    public void With_periods_the_move_comes_at_the_first_boundary_after_the_span_and_the_wait_is_filled()
    {
        var options = TenDays with { Period = LogPeriod.Days(1, TimeZoneInfo.Utc), LogEnd = Scans.At("2024-02-01") };

        var counts = Scans.Count(options, "c1 2024-01-01T08:00 clean");

        // at the boundaries of 2 to 11 January clean, from 12 January (10 days 16 hours unseen) lost
        counts.Moves().Should().Equal("clean>clean 9", "clean>lost 1");
        counts.Log!.FilledPeriods.Should().Be(9);
        counts.Log.SilentItems.Should().Be(1);
    }

    [Fact]
    public void With_periods_silence_that_no_boundary_follows_leaves_the_item_open()
    {
        var options = TenDays with { Period = LogPeriod.Months(1, TimeZoneInfo.Utc), LogEnd = Scans.At("2024-01-31") };

        var counts = Scans.Count(options, "c1 2023-12-30T08:00 clean");

        counts.TotalCount.Should().Be(0);
        counts.Log!.OpenItems.Should().Be(1);
    }

    [Fact]
    public void With_periods_a_counted_return_fills_the_silence_with_the_named_state()
    {
        var options = Returns with { Period = LogPeriod.Weeks(1, TimeZoneInfo.Utc) };

        // Mondays: 8 and 15 January clean (unseen 6 days 16 h, 13 days 16 h: lost from the 15th), back on Thursday 1 February
        var counts = Scans.Count(options, "c1 2024-01-01T08:00 clean", "c1 2024-02-01T08:00 filled", "c2 2024-02-05T00:00 clean");

        counts.Moves().Should().Equal("clean>lost 1", "lost>filled 1", "lost>lost 2");
        counts.Log!.FilledPeriods.Should().Be(2);
    }

    [Fact]
    public void With_a_span_shorter_than_the_period_the_last_state_is_still_seen_at_one_boundary()
    {
        var options = new LogOptions<string>
        {
            Period = LogPeriod.Days(1, TimeZoneInfo.Utc),
            Silence = new SilenceRule<string>(TimeSpan.FromHours(1), "lost"),
            LogEnd = Scans.At("2024-01-04"),
        };

        Scans.Count(options, "c1 2024-01-01T08:00 clean").Moves().Should().Equal("clean>lost 1");
    }

    [Fact]
    public void A_span_that_is_not_above_zero_or_a_null_state_is_refused()
    {
        var zero = () => new SilenceRule<string>(TimeSpan.Zero, "lost");
        var nothing = () => new SilenceRule<string>(TimeSpan.FromDays(1), null!);

        zero.Should().Throw<ArgumentOutOfRangeException>().WithMessage("The span of silence must be above zero.*");
        nothing.Should().Throw<ArgumentNullException>();
    }
}
