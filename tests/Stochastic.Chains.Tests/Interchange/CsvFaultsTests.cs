using System.Text;

namespace Stochastic.Chains.Tests.Interchange;

public sealed class CsvFaultsTests
{
    private const string Header = "crate,scanned_at,stage\n";

    [Fact]
    public void A_missing_column_is_refused_naming_those_there_are()
    {
        var faults = CsvLog.FaultsOf("Crate,scanned_at,status,note\nc1,2024-01-01T08:00Z,clean,\n");

        faults.Select(fault => fault.Message).Should().Equal(
            "There is no column 'crate' in the header (line 1); there are 'Crate', 'scanned_at', 'status', 'note'. Correct the name, or the separator.",
            "There is no column 'stage' in the header (line 1); there are 'Crate', 'scanned_at', 'status', 'note'. Correct the name, or the separator.");
        faults.Should().OnlyContain(fault => fault.Kind == LogFaultKind.MissingColumn && fault.Lines.Single() == 1);
    }

    [Fact]
    public void A_repeated_column_is_refused()
    {
        var fault = CsvLog.OnlyFaultOf("\ncrate,scanned_at,stage,stage\nc1,2024-01-01T08:00Z,clean,dirty\n");

        fault.Kind.Should().Be(LogFaultKind.RepeatedColumn);
        fault.Message.Should().Be("The header (line 2) names column 'stage' more than once. Rename all but one.");
    }

    [Fact]
    public void A_repeated_column_that_is_not_used_does_no_harm() =>
        CsvLog.Read("crate,scanned_at,stage,note,note\nc1,2024-01-01T08:00Z,clean,a,b\n").Should().ContainSingle();

    [Fact]
    public void Ragged_rows_are_refused_by_line()
    {
        var faults = CsvLog.FaultsOf(Header + "c1,2024-01-01T08:00Z\nc1,2024-01-02T08:00Z,clean\nc1,2024-01-03T08:00Z,clean,extra\n");

        faults.Select(fault => fault.Message).Should().Equal(
            "Line 2 has 2 fields; the header has 3. Correct the row, or quote a field that holds the separator.",
            "Line 4 has 4 fields; the header has 3. Correct the row, or quote a field that holds the separator.");
        faults.Should().OnlyContain(fault => fault.Kind == LogFaultKind.RaggedRow);
    }

    [Fact]
    public void Empty_items_and_states_are_refused_by_line()
    {
        var faults = CsvLog.FaultsOf(Header + ",2024-01-01T08:00Z,clean\nc1,2024-01-01T08:00Z,\" \"\n \t,2024-01-01T08:00Z,\n");

        faults.Select(fault => (fault.Kind, fault.Lines[0])).Should().Equal(
            (LogFaultKind.EmptyItem, 2L), (LogFaultKind.EmptyState, 3L), (LogFaultKind.EmptyItem, 4L), (LogFaultKind.EmptyState, 4L));
        faults[0].Message.Should().Be("Column 'crate' is empty on line 2. Give every event its item and its state.");
        faults[1].Message.Should().Be("Column 'stage' is empty on line 3. Give every event its item and its state.");
    }

    [Fact]
    public void Two_states_at_one_instant_are_refused_with_both_lines()
    {
        var fault = CsvLog.OnlyFaultOf(Header + "c1,2024-01-01T08:00Z,clean\nc2,2024-01-01T08:00Z,clean\nc1,2024-01-01T10:00+02:00,dirty\n");

        fault.Kind.Should().Be(LogFaultKind.TwoStatesAtOneInstant);
        fault.Lines.Should().Equal(2, 4);
        fault.Message.Should().Be(
            "Item 'c1' is in 'clean' (line 2) and in 'dirty' (line 4) at one instant, 2024-01-01T08:00:00+00:00. Remove one of them or correct a time.");
    }

    [Fact]
    public void An_unlisted_state_is_refused_by_line()
    {
        var act = () => EventLog.CountCsv(
            new StringReader(Header + "c1,2024-01-01T08:00Z,claen\n"), CsvLog.Columns, new LogOptions<string> { States = ["clean"] });

        act.Should().Throw<EventLogException>().WithMessage(
            "*Item 'c1' is in 'claen' (line 2), which is not in the list of states. Correct the label or add it to the list.");
    }

    [Theory]
    [InlineData("c1,2024-01-01T08:00Z,5\" pipe\nc1,2024-01-02T08:00Z,6\" pipe\n", 2)]
    [InlineData("c1,2024-01-01T08:00Z,\"clean\nc1,2024-01-02T08:00Z,dirty\n", 2)]
    [InlineData("c1,2024-01-01T08:00Z,clean\nc1,2024-01-02T08:00Z,\"dirty\"x\n", 3)]
    [InlineData("c1,2024-01-01T08:00Z,\"a\"b\"\n", 2)]
    [InlineData("c1,2024-01-01T08:00Z,\"\n", 2)]
    [InlineData("c1,2024-01-01T08:00Z,\"clean\"\"\n", 2)]
    public void A_quote_out_of_place_is_refused_rather_than_rows_swallowed(string rows, int line)
    {
        var fault = CsvLog.OnlyFaultOf(Header + rows);

        fault.Kind.Should().Be(LogFaultKind.UnreadableRow);
        fault.Lines.Should().Equal(line);
        fault.Message.Should().Be(
            $"The row that begins on line {line} has a quote out of place. Close every quote, write quotes within a quoted field twice, and quote the whole of a field that holds any.");
    }

    [Fact]
    public void A_stray_quote_in_a_column_that_is_not_used_is_refused_too() =>
        CsvLog.OnlyFaultOf("crate,scanned_at,stage,note\nc1,2024-01-01T08:00Z,clean,5\" high\nc1,2024-01-02T08:00Z,dirty,6\" high\n")
            .Kind.Should().Be(LogFaultKind.UnreadableRow);

    [Fact]
    public void A_quote_that_is_never_closed_in_a_huge_file_is_refused_with_its_line()
    {
        var fault = CsvLog.OnlyFaultOf(Header + "c1,2024-01-01T08:00Z,clean\nc1,2024-01-02T08:00Z,\"" + new string('x', 17_000_000));

        fault.Kind.Should().Be(LogFaultKind.UnreadableRow);
        fault.Message.Should().Be("The row that begins on line 3 does not end; nothing after it was read. Close its quote.");
    }

    [Fact]
    public void A_file_that_is_not_utf_8_is_refused_rather_than_misread()
    {
        using var file = new TemporaryFile(Header + "c1,2024-01-01T08:00Z,gefüllt\nc1,2024-01-02T08:00Z,gelöst\n", Encoding.Latin1);

        var act = () => EventLog.CountCsv(file.Path, CsvLog.Columns);

        act.Should().Throw<EventLogException>().WithMessage(
            "*The file is not UTF-8 on or after line *; nothing after it was read. Open it with a StreamReader in its own encoding, and give that.");
        using var text = new StreamReader(file.Path, Encoding.Latin1);
        EventLog.CountCsv(text, CsvLog.Columns).States.Should().Equal("gefüllt", "gelöst");
    }

    [Fact]
    public void A_long_file_that_is_not_utf_8_somewhere_is_refused_as_well()
    {
        var rows = string.Concat(Enumerable.Range(0, 20_000).Select(k => $"c{k},2024-01-01T08:00Z,clean\n"));
        using var file = new TemporaryFile(Header + rows + "c1,2024-01-02T08:00Z,gefüllt\n", Encoding.Latin1);

        var act = () => EventLog.ReadCsv(file.Path, CsvLog.Columns).Count();

        act.Should().Throw<EventLogException>().Which.Faults.Should().ContainSingle().Which.Kind.Should().Be(LogFaultKind.UnreadableRow);
    }

    [Theory]
    [InlineData("", "The log is empty: it has no header. Give a first row with the names of the columns.")]
    [InlineData("\n \n", "The log is empty: it has no header. Give a first row with the names of the columns.")]
    [InlineData(Header, "The log has no events. Give at least one.")]
    [InlineData(Header + "\n", "The log has no events. Give at least one.")]
    public void An_empty_log_is_refused(string csv, string message)
    {
        var fault = CsvLog.OnlyFaultOf(csv);

        (fault.Kind, fault.Message).Should().Be((LogFaultKind.EmptyLog, message));
        FluentActions.Invoking(() => CsvLog.Read(csv)).Should().Throw<EventLogException>().Which.Faults.Should().ContainSingle();
    }

    [Fact]
    public void All_faults_of_a_file_are_refused_together()
    {
        var faults = CsvLog.FaultsOf(
            Header + "c1,2024-01-01T08:00Z,clean\nc1,yesterday,clean\n,2024-01-01T08:00Z,clean\nc1,2024-01-01T08:00Z,dirty\nc1\n");

        faults.Select(fault => (fault.Kind, fault.Lines[0])).Should().Equal(
            (LogFaultKind.UnreadableTime, 3L), (LogFaultKind.EmptyItem, 4L), (LogFaultKind.RaggedRow, 6L), (LogFaultKind.TwoStatesAtOneInstant, 2L));
    }

    [Fact]
    public void Faults_beyond_the_documented_number_are_counted()
    {
        var act = () => CsvLog.Count(Header + string.Concat(Enumerable.Repeat("c1,never,clean\n", 2500)));

        var refused = act.Should().Throw<EventLogException>().Which;
        (refused.Faults.Count, refused.FaultCount).Should().Be((EventLogException.MaxListedFaults, 2500L));
        refused.Message.Should().StartWith("The log is not valid (2,500 faults):").And.EndWith("- … and 2,480 more.");
    }

    [Fact]
    public void Events_read_one_by_one_are_refused_at_the_end()
    {
        var read = new List<string>();

        var act = () =>
        {
            foreach (var entry in EventLog.ReadCsv(new StringReader(Header + "c1,never,clean\nc2,2024-01-01T08:00Z,clean\n"), CsvLog.Columns))
            {
                read.Add(entry.Item);
            }
        };

        act.Should().Throw<EventLogException>().Which.Faults.Should().ContainSingle().Which.Lines.Should().Equal(2);
        read.Should().Equal("c2");
    }

    [Fact]
    public void A_file_that_is_not_there_is_refused_with_its_full_path_before_reading()
    {
        var count = () => EventLog.CountCsv("no-such-log.csv", CsvLog.Columns);
        var read = () => EventLog.ReadCsv("no-such-log.csv", CsvLog.Columns);

        var fault = count.Should().Throw<EventLogException>().Which.Faults.Should().ContainSingle().Which;
        fault.Kind.Should().Be(LogFaultKind.FileNotFound);
        fault.Message.Should().Be($"There is no file 'no-such-log.csv'; it was looked for at '{Path.GetFullPath("no-such-log.csv")}'. Correct the path.");
        read.Should().Throw<EventLogException>();
    }

    [Fact]
    public void A_separator_that_cannot_separate_is_refused()
    {
        foreach (var separator in new[] { '"', '\n', 'é' })
        {
            FluentActions.Invoking(() => CsvLog.Read(Header, CsvLog.Columns with { Separator = separator })).Should().Throw<ArgumentException>().WithMessage(
                $"The separator is the character {(int)separator}. Give a tab or a printable ASCII character other than the quote.*");
        }
    }

    [Fact]
    public void Columns_without_a_name_or_formats_are_refused_where_they_are_set()
    {
        FluentActions.Invoking(() => CsvLog.Columns with { Item = " " }).Should().Throw<ArgumentException>();
        FluentActions.Invoking(() => CsvLog.Columns with { Time = null! }).Should().Throw<ArgumentException>();
        FluentActions.Invoking(() => CsvLog.Columns with { TimeFormats = null! }).Should().Throw<ArgumentNullException>();
    }

    [Fact]
    public void Null_arguments_are_refused()
    {
        FluentActions.Invoking(() => EventLog.CountCsv((string)null!, CsvLog.Columns)).Should().Throw<ArgumentNullException>();
        FluentActions.Invoking(() => EventLog.CountCsv(" ", CsvLog.Columns)).Should().Throw<ArgumentException>();
        FluentActions.Invoking(() => EventLog.CountCsv((TextReader)null!, CsvLog.Columns)).Should().Throw<ArgumentNullException>();
        FluentActions.Invoking(() => EventLog.CountCsv("log.csv", null!)).Should().Throw<ArgumentNullException>();
        FluentActions.Invoking(() => EventLog.CountCsv("log.csv", CsvLog.Columns, null!)).Should().Throw<ArgumentNullException>();
        FluentActions.Invoking(() => EventLog.ReadCsv((TextReader)null!, CsvLog.Columns)).Should().Throw<ArgumentNullException>();
        FluentActions.Invoking(() => EventLog.ReadCsv("log.csv", null!)).Should().Throw<ArgumentNullException>();
    }
}
