using System.Globalization;
using System.Text;
using Stochastic.Chains.Tests.Support;

namespace Stochastic.Chains.Tests.Interchange;

public sealed class ReadingCsvTests
{
    [Fact]
    public void Columns_are_found_by_name_in_any_order_and_others_ignored()
    {
        var events = CsvLog.Read("note,stage, crate ,scanned_at\nfirst,clean,c1,2024-01-01T08:00Z\n,filled,c1,2024-01-02T08:00Z\n");

        events.Should().Equal(
            new LogEvent<string, string>("c1", new DateTimeOffset(2024, 1, 1, 8, 0, 0, TimeSpan.Zero), "clean") { Line = 2 },
            new LogEvent<string, string>("c1", new DateTimeOffset(2024, 1, 2, 8, 0, 0, TimeSpan.Zero), "filled") { Line = 3 });
    }

    [Fact]
    public void Unsorted_and_interleaved_rows_are_counted_per_item()
    {
        var counts = CsvLog.Count("crate,scanned_at,stage\nc1,2024-01-03T08:00Z,dirty\nc2,2024-01-01T08:00Z,clean\nc1,2024-01-01T08:00Z,clean\n");

        counts["clean", "dirty"].Should().Be(1);
        counts.TotalCount.Should().Be(1);
        counts.Log!.Items.Should().Be(2);
    }

    [Fact]
    public void Quoted_fields_may_hold_separators_line_breaks_and_doubled_quotes()
    {
        var events = CsvLog.Read(
            "crate,scanned_at,stage,note\r\n" +
            "\"c1, old\",2024-01-01T08:00Z,\"with \"\"customer\"\"\",\"two\r\nlines\"\r\n" +
            "c2,\"2024-01-02T08:00Z\",\"in\r\nwash\",\"\"\r\n" +
            "c3,2024-01-03T08:00Z,clean,\r\n");

        events.Select(read => (read.Item, read.State, read.Line)).Should().Equal(
            ("c1, old", "with \"customer\"", 2L), ("c2", "in\r\nwash", 4L), ("c3", "clean", 6L));
    }

    [Theory]
    [InlineData("\n")]
    [InlineData("\r\n")]
    [InlineData("\r")]
    public void Lines_end_in_any_of_the_usual_ways_the_last_with_or_without(string end)
    {
        string[] lines = ["crate,scanned_at,stage", "c1,2024-01-01T08:00Z,clean", string.Empty, "c1,2024-01-02T08:00Z,dirty"];

        CsvLog.Read(string.Join(end, lines)).Select(read => read.Line).Should().Equal(2, 4);
        CsvLog.Read(string.Join(end, lines) + end).Select(read => read.Line).Should().Equal(2, 4);
    }

    [Theory]
    [InlineData("\uFEFFcrate,scanned_at,stage\n")]
    [InlineData("\uFEFF\"crate\",scanned_at,stage\n")]
    [InlineData("\"crate\",\"scanned_at\",\"stage\"\n")]
    public void Byte_order_marks_and_quotes_are_no_part_of_a_column_name(string header) =>
        CsvLog.Read(header + "c1,2024-01-01T08:00Z,clean\n").Should().ContainSingle().Which.Item.Should().Be("c1");

    [Fact]
    public void A_file_with_a_byte_order_mark_is_read_as_it_says()
    {
        foreach (var encoding in new Encoding[] { new UTF8Encoding(true), new UnicodeEncoding(false, true), new UTF8Encoding(false) })
        {
            using var file = new TemporaryFile("crate,scanned_at,stage\nKäfig 1,2024-01-01T08:00Z,gefüllt\n", encoding);

            EventLog.ReadCsv(file.Path, CsvLog.Columns).Should().ContainSingle().Which.State.Should().Be("gefüllt");
            EventLog.CountCsv(file.Path, CsvLog.Columns).States.Should().Equal("gefüllt");
        }
    }

    [Fact]
    public void Blanks_around_a_field_are_taken_off_and_those_within_its_quotes_kept()
    {
        var events = CsvLog.Read("crate, scanned_at, stage\n c1 , 2024-01-01T08:00Z , in wash \nc2, 2024-01-01T08:00Z, \" in wash\"\n");

        events.Select(read => (read.Item, read.State)).Should().Equal(("c1", "in wash"), ("c2", " in wash"));
    }

    [Fact]
    public void Blank_lines_are_passed_over_wherever_they_stand() =>
        CsvLog.Read("\n\ncrate,scanned_at,stage\n\n   \nc1,2024-01-01T08:00Z,clean\n\n").Should().ContainSingle().Which.Line.Should().Be(6);

    [Theory]
    [InlineData(';')]
    [InlineData('\t')]
    [InlineData('|')]
    public void Another_separator_can_be_given(char separator)
    {
        var csv = "crate,scanned_at,stage\nc1,2024-01-01T08:00Z,clean\n".Replace(',', separator);

        CsvLog.Read(csv, CsvLog.Columns with { Separator = separator }).Should().ContainSingle().Which.State.Should().Be("clean");
    }

    [Fact]
    public void The_culture_of_the_machine_changes_nothing()
    {
        using var german = new CommaCulture();

        var read = CsvLog.Read("crate,scanned_at,stage\nc1,2024-02-03T08:00:00.25Z,clean\n").Should().ContainSingle().Which;

        read.Time.Should().Be(new DateTimeOffset(2024, 2, 3, 8, 0, 0, 250, TimeSpan.Zero));
    }

    [Fact]
    public void Events_can_be_given_another_type_of_state_and_keep_their_lines()
    {
        var events = EventLog.ReadCsv(new StringReader("crate,scanned_at,stage\np1,2024-01-01,New\np1,2024-01-01,Worn\n"), CsvLog.Columns with { TimeZone = TimeZoneInfo.Utc })
            .Select(read => new LogEvent<string, Stage>(read.Item, read.Time, Enum.Parse<Stage>(read.State)) { Line = read.Line });

        FluentActions.Invoking(() => TransitionCounts.FromEvents(events)).Should().Throw<EventLogException>()
            .WithMessage("*Item 'p1' is in 'New' (line 2) and in 'Worn' (line 3) at one instant*");
    }

    [Fact]
    public void Options_apply_to_a_counted_file()
    {
        var options = new LogOptions<string> { States = ["dirty", "clean", "lost"], Silence = new SilenceRule<string>(TimeSpan.FromDays(30), "lost") };

        var counts = EventLog.CountCsv(
            new StringReader("crate,scanned_at,stage\nc1,2024-01-01T08:00Z,clean\nc2,2024-06-01T08:00Z,dirty\n"), CsvLog.Columns, options);

        counts.States.Should().Equal("dirty", "clean", "lost");
        counts["clean", "lost"].Should().Be(1);
    }

    [Fact]
    public void A_long_file_is_read_with_the_right_lines_and_reports_progress()
    {
        const int Rows = 150_000;
        var csv = new StringBuilder("crate,scanned_at,stage,note\n");
        for (var k = 0; k < Rows; k++)
        {
            csv.Append(CultureInfo.InvariantCulture, $"c{k % 90_000},2024-01-{1 + (k / 90_000):00}T08:00:00Z,{(k < 90_000 ? "clean" : "dirty")},\"a, b\"\n");
        }

        using var file = new TemporaryFile(csv.ToString(), new UTF8Encoding(false));
        var fractions = new List<double>();
        var options = new LogOptions<string> { Progress = new FractionRecorder(fractions) };

        var counts = EventLog.CountCsv(file.Path, CsvLog.Columns, options);

        counts["clean", "dirty"].Should().Be(60_000);
        counts.Log!.Events.Should().Be(Rows);
        EventLog.ReadCsv(file.Path, CsvLog.Columns).Select((read, k) => read.Line - k).Distinct().Should().Equal(2);
        fractions.Should().HaveCountGreaterThan(4).And.OnlyContain(fraction => fraction >= 0 && fraction <= 1).And.Contain(fraction => fraction > 0 && fraction < 1);
    }

    [Fact]
    public void Counting_a_file_can_be_cancelled()
    {
        using var source = new CancellationTokenSource();
        source.Cancel();

        var act = () => EventLog.CountCsv(
            new StringReader("crate,scanned_at,stage\nc1,2024-01-01T08:00Z,clean\n"), CsvLog.Columns, new LogOptions<string> { CancellationToken = source.Token });

        act.Should().Throw<OperationCanceledException>();
    }

    private sealed class FractionRecorder(List<double> fractions) : IProgress<SolveProgress>
    {
        public void Report(SolveProgress value) => fractions.Add(value.Fraction);
    }
}
