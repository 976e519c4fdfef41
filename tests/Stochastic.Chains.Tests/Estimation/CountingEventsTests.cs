using Stochastic.Chains.Tests.Support;

namespace Stochastic.Chains.Tests.Estimation;

public sealed class CountingEventsTests
{
    private static readonly LogOptions<string> TimeOnlyOrders = new();

    [Fact]
    public void Each_event_after_an_items_first_is_one_move_and_a_repeated_state_is_a_stay()
    {
        var counts = Scans.Count(TimeOnlyOrders, "c1 2024-01-01T08:00 clean", "c1 2024-01-02T08:00 clean", "c1 2024-03-01T08:00 filled");

        counts.Moves().Should().Equal("clean>clean 1", "clean>filled 1");
        counts.PathCount.Should().Be(1);
        counts.Log!.Moves.Should().Be(2);
        counts.Log.FilledPeriods.Should().Be(0);
        counts.Log.Assumptions.Should().BeEmpty();
    }

    [Fact]
    public void Interleaved_items_and_unsorted_times_are_put_in_order_and_never_counted_across()
    {
        var counts = Scans.Count(
            TimeOnlyOrders,
            "c1 2024-01-03T08:00 dirty",
            "c2 2024-01-01T09:00 filled",
            "c1 2024-01-01T08:00 clean",
            "c2 2024-01-04T08:00 dirty",
            "c1 2024-01-02T08:00 filled");

        counts.Moves().Should().Equal("filled>dirty 2", "clean>filled 1");
        counts.States.Should().Equal("dirty", "filled", "clean");
    }

    [Fact]
    public void Any_order_of_the_events_gives_the_same_counts()
    {
        var seeded = new Random(5);
        string[] stages = ["clean", "filled", "dirty"];
        LogEvent<int, string>[] events = [.. Enumerable.Range(0, 40_000).Select(k =>
            new LogEvent<int, string>(k % 700, DateTimeOffset.UnixEpoch.AddMinutes((k * 31L) % 40_000), stages[seeded.Next(3)]))];
        var options = new LogOptions<string> { States = stages };
        var expected = TransitionCounts.FromPaths(stages, events.GroupBy(entry => entry.Item).Select(item => item.OrderBy(entry => entry.Time).Select(entry => entry.State)));

        for (var trial = 0; trial < 3; trial++)
        {
            seeded.Shuffle(events);
            TransitionCounts.FromEvents(events, options).Moves.Should().Equal(expected.Moves);
        }
    }

    [Fact]
    public void Only_the_instant_orders_not_the_offset_in_which_it_is_written()
    {
        var counts = Scans.Count(TimeOnlyOrders, "c1 2024-01-01T10:00+05:00 first", "c1 2024-01-01T07:00+01:00 second");

        counts.Moves().Should().Equal("first>second 1");
    }

    [Fact]
    public void A_repeated_event_counts_once_and_is_reported()
    {
        var counts = Scans.Count(
            TimeOnlyOrders, "c1 2024-01-01T08:00Z clean", "c1 2024-01-01T09:00+01:00 clean", "c1 2024-01-02T08:00Z dirty", "c1 2024-01-02T08:00Z dirty");

        counts.Moves().Should().Equal("clean>dirty 1");
        counts.Log!.DuplicateEvents.Should().Be(2);
        counts.Log.Events.Should().Be(4);
    }

    [Fact]
    public void Two_states_at_one_instant_are_refused_with_the_item_both_states_and_both_events()
    {
        var act = () => Scans.Count(TimeOnlyOrders, "c1 2024-01-01T08:00Z clean", "c2 2024-01-01T08:00Z clean", "c1 2024-01-01T09:00+01:00 dirty");

        var fault = act.Should().Throw<EventLogException>().Which.Faults.Should().ContainSingle().Which;
        fault.Kind.Should().Be(LogFaultKind.TwoStatesAtOneInstant);
        fault.Lines.Should().Equal(1, 3);
        fault.Message.Should().Be(
            "Item 'c1' is in 'clean' (event 1) and in 'dirty' (event 3) at one instant, 2024-01-01T08:00:00+00:00. Remove one of them or correct a time.");
        fault.ToString().Should().Be(fault.Message);
    }

    [Fact]
    public void Items_in_the_log_with_a_single_event_are_reported()
    {
        var log = Scans.Count(TimeOnlyOrders, "c1 2024-01-01T08:00 clean", "c2 2024-01-01T08:00 clean", "c2 2024-01-02T08:00 dirty").Log!;

        log.SingleEventItems.Should().Be(1);
        log.Items.Should().Be(2);
    }

    [Fact]
    public void Items_open_at_the_end_are_counted_apart_by_state()
    {
        var options = new LogOptions<string> { FinalStates = ["scrapped"] };

        var log = Scans.Count(
            options,
            "c1 2024-01-01T08:00 clean", "c1 2024-01-02T08:00 scrapped",
            "c2 2024-01-01T08:00 clean", "c2 2024-01-02T08:00 dirty",
            "c3 2024-01-01T08:00 dirty").Log!;

        log.OpenItems.Should().Be(2);
        log.OpenItemsByState.Should().BeEquivalentTo(new Dictionary<string, long> { ["dirty"] = 2 });
        log.FinishedItems.Should().Be(1);
        log.SilentItems.Should().Be(0);
        (log.FirstTime, log.LastTime, log.LogEnd).Should().Be((Scans.At("2024-01-01T08:00"), Scans.At("2024-01-02T08:00"), Scans.At("2024-01-02T08:00")));
    }

    [Fact]
    public void Listed_states_keep_their_order_and_stay_when_never_seen()
    {
        var options = new LogOptions<string> { States = ["lost", "dirty", "clean"] };

        var counts = Scans.Count(options, "c1 2024-01-01T08:00 clean", "c1 2024-01-02T08:00 dirty");

        counts.States.Should().Equal("lost", "dirty", "clean");
        counts.NeverLeftStates.Should().Equal("lost", "dirty");
    }

    [Fact]
    public void The_comparer_may_be_given_or_come_with_the_states()
    {
        string[] lines = ["c1 2024-01-01T08:00 CLEAN", "c1 2024-01-02T08:00 clean"];

        Scans.Count(new LogOptions<string> { Comparer = StringComparer.OrdinalIgnoreCase }, lines).Moves().Should().Equal("CLEAN>CLEAN 1");
        Scans.Count(new LogOptions<string> { Comparer = StringComparer.OrdinalIgnoreCase, States = ["Clean"] }, lines).Moves().Should().Equal("Clean>Clean 1");
        Scans.Count(new LogOptions<string> { States = StateSpace.Of(["Clean"], StringComparer.OrdinalIgnoreCase) }, lines).Moves().Should().Equal("Clean>Clean 1");
    }

    [Fact]
    public void Every_faulty_event_is_refused_by_number()
    {
        var options = new LogOptions<string> { States = ["clean"], LogEnd = Scans.At("2024-02-01T00:00Z") };
        LogEvent<string, string>[] events =
        [
            new(null!, Scans.At("2024-01-01T08:00"), "clean"),
            new("c1", Scans.At("2024-01-01T08:00"), null!),
            new("c1", Scans.At("2024-01-01T09:00"), "claen"),
            new("c1", Scans.At("2024-02-01T00:00:01Z"), "clean"),
        ];

        var act = () => TransitionCounts.FromEvents(events, options);

        var refused = act.Should().Throw<EventLogException>().Which;
        refused.FaultCount.Should().Be(4);
        refused.Faults.Select(fault => fault.Kind).Should().Equal(
            LogFaultKind.EmptyItem, LogFaultKind.EmptyState, LogFaultKind.UnknownState, LogFaultKind.AfterLogEnd);
        refused.Message.ReplaceLineEndings("\n").Should().Be(
            """
            The log is not valid (4 faults):
            - The item of event 1 is null. Give every event its item.
            - The state of event 2 is null. Give every event its state.
            - Item 'c1' is in 'claen' (event 3), which is not in the list of states. Correct the label or add it to the list.
            - The time 2024-02-01T00:00:01+00:00 (event 4) is after the given end of the log, 2024-02-01T00:00:00+00:00. Leave out later events, or give a later end.
            """);
    }

    [Fact]
    public void Events_that_carry_their_line_are_refused_by_line()
    {
        LogEvent<string, string>[] events =
        [
            new("c1", Scans.At("2024-01-01T08:00"), "clean") { Line = 12 },
            new("c1", Scans.At("2024-01-01T08:00"), "dirty") { Line = 7 },
        ];

        var act = () => TransitionCounts.FromEvents(events);

        act.Should().Throw<EventLogException>().Which.Faults.Should().ContainSingle()
            .Which.Message.Should().StartWith("Item 'c1' is in 'clean' (line 12) and in 'dirty' (line 7) at one instant");
    }

    [Fact]
    public void Faults_beyond_the_documented_number_are_counted()
    {
        var events = Enumerable.Range(0, 1500).Select(_ => new LogEvent<string, string>(null!, DateTimeOffset.UnixEpoch, "clean"));

        var act = () => TransitionCounts.FromEvents(events);

        var refused = act.Should().Throw<EventLogException>().Which;
        refused.Faults.Should().HaveCount(EventLogException.MaxListedFaults);
        refused.FaultCount.Should().Be(1500);
        refused.Message.Should().StartWith("The log is not valid (1,500 faults):").And.EndWith("- … and 1,480 more.");
    }

    [Fact]
    public void An_empty_log_is_refused()
    {
        var act = () => TransitionCounts.FromEvents(Array.Empty<LogEvent<string, string>>());

        act.Should().Throw<EventLogException>().Which.Faults.Should().ContainSingle().Which.Message.Should().Be("The log has no events. Give at least one.");
    }

    [Fact]
    public void Options_that_name_an_unlisted_end_are_refused()
    {
        var options = new LogOptions<string> { States = ["clean"], FinalStates = ["scraped"], Silence = new SilenceRule<string>(TimeSpan.FromDays(9), "lots") };

        var act = () => Scans.Count(options, "c1 2024-01-01T08:00 clean");

        act.Should().Throw<InvalidChainException>().Which.Faults.Select(fault => fault.Message).Should().Equal(
            "The options name 'scraped' as an end, but it is not in their list of states. Correct the label or add it to the list.",
            "The options name 'lots' as an end, but it is not in their list of states. Correct the label or add it to the list.");
    }

    [Fact]
    public void Null_final_states_are_refused_where_they_are_set()
    {
        FluentActions.Invoking(() => new LogOptions<string> { FinalStates = null! }).Should().Throw<ArgumentNullException>();
        FluentActions.Invoking(() => new LogOptions<string> { FinalStates = ["sold", null!] }).Should().Throw<ArgumentException>()
            .WithMessage("A final state is null. Give every state a label.*");
    }

    [Fact]
    public void Null_arguments_are_refused()
    {
        FluentActions.Invoking(() => TransitionCounts.FromEvents<string, string>(null!)).Should().Throw<ArgumentNullException>();
        FluentActions.Invoking(() => TransitionCounts.FromEvents(Scans.Of("c 2024-01-01 a"), null!)).Should().Throw<ArgumentNullException>();
        FluentActions.Invoking(() => { _ = TransitionCounts.FromEventsAsync<string, string>(null!); }).Should().Throw<ArgumentNullException>();
    }

    [Fact]
    public void Counting_can_be_cancelled_and_reports_progress()
    {
        using var source = new CancellationTokenSource();
        var reports = new List<SolveProgress>();
        var options = new LogOptions<string> { CancellationToken = source.Token, Progress = new Recorder(reports) };
        var events = Enumerable.Range(0, 1_000_000).Select(k =>
        {
            if (k == 100_000)
            {
                source.Cancel();
            }

            return new LogEvent<int, string>(k, DateTimeOffset.UnixEpoch, "clean");
        });

        FluentActions.Invoking(() => TransitionCounts.FromEvents(events, options)).Should().Throw<OperationCanceledException>();
        reports.Should().Equal(new SolveProgress("reading events", 0), new SolveProgress("reading events", 65_536 / 1e6));
    }

    [Fact]
    public void Progress_ends_with_everything_counted()
    {
        var reports = new List<SolveProgress>();

        Scans.Count(new LogOptions<string> { Progress = new Recorder(reports) }, "c1 2024-01-01T08:00 clean");

        reports[0].Should().Be(new SolveProgress("reading events", 0));
        reports[^1].Should().Be(new SolveProgress("counting moves", 1));
    }

    [Fact]
    public void The_account_of_the_log_reads_the_same_in_every_culture()
    {
        using var german = new CommaCulture();
        var options = new LogOptions<string>
        {
            Period = LogPeriod.Days(1, Scans.Berlin),
            Silence = new SilenceRule<string>(TimeSpan.FromDays(2), "lost"),
        };

        Scans.Count(options, "c1 2024-01-01T08:00 clean", "c1 2024-01-03T08:00 dirty", "c2 2024-01-09T08:00 clean").Log!
            .ToString().ReplaceLineEndings("\n").Should().Be(
            """
            Log
            events                                                   3
            items                                                    2
            first event                      2024-01-01T08:00:00+00:00
            last event                       2024-01-09T08:00:00+00:00
            end of the log                   2024-01-09T08:00:00+00:00
            moves counted                                            4
            items open at the end                                    1
            items gone silent                                        1
            items finished                                           0
            items with a single event                                1
            duplicate events                                         0
            returns after silence                                    0
            periods filled                                           2
            events passed over                                       0
            events in the unfinished period                          1
            Assumed: the state of an item did not change between its events. Periods of 1 day, counted from 2001-01-01 in Europe/Berlin; 2 boundaries without an event since the one before were filled with the state last seen.
            Assumed: an item unseen for more than 2 days has moved to 'lost'; this was applied to 1 item.
            Assumed: an item that came back after such a silence was never in 'lost'; 0 returns were seen.
            """);
    }

    [Fact]
    public void States_of_any_type_are_counted()
    {
        var counts = TransitionCounts.FromEvents(
        [
            new LogEvent<int, Stage>(1, Scans.At("2024-01-01"), Stage.New),
            new LogEvent<int, Stage>(1, Scans.At("2024-01-02"), Stage.Worn),
        ]);

        counts[Stage.New, Stage.Worn].Should().Be(1);
    }

    private sealed class Recorder(List<SolveProgress> reports) : IProgress<SolveProgress>
    {
        public void Report(SolveProgress value) => reports.Add(value);
    }
}
