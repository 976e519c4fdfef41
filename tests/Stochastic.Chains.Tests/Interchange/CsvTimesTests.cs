using System.Globalization;

namespace Stochastic.Chains.Tests.Interchange;

public sealed class CsvTimesTests
{
    [Theory]
    [InlineData("2024-05-06T14:30:00+02:00", "2024-05-06T12:30:00Z")]
    [InlineData("2024-05-06T14:30:00.1234567+02:00", "2024-05-06T12:30:00.1234567Z")]
    [InlineData("2024-05-06T14:30:00.5Z", "2024-05-06T14:30:00.5Z")]
    [InlineData("2024-05-06T14:30:00-0330", "2024-05-06T18:00:00Z")]
    [InlineData("2024-05-06T14:30:00+02", "2024-05-06T12:30:00Z")]
    [InlineData("2024-05-06T14:30Z", "2024-05-06T14:30:00Z")]
    [InlineData("2024-05-06 14:30+02:00", "2024-05-06T12:30:00Z")]
    [InlineData("2024-05-06 14:30:00.123 +02:00", "2024-05-06T12:30:00.123Z")]
    [InlineData("2024-05-06 14:30:00.123+02", "2024-05-06T12:30:00.123Z")]
    [InlineData("20240506T143000Z", "2024-05-06T14:30:00Z")]
    public void Times_with_an_offset_need_no_time_zone(string written, string instant) =>
        Read(written, CsvLog.Columns).Should().Be(Instant(instant));

    [Theory]
    [InlineData("2024-05-06T14:30:00", "2024-05-06T12:30:00Z")]
    [InlineData("2024-05-06 14:30:00", "2024-05-06T12:30:00Z")]
    [InlineData("2024-05-06 14:30", "2024-05-06T12:30:00Z")]
    [InlineData("2024-01-06 14:30", "2024-01-06T13:30:00Z")]
    [InlineData("2024-05-06", "2024-05-05T22:00:00Z")]
    [InlineData("2024-05-06T14:30:00Z", "2024-05-06T14:30:00Z")]
    public void Times_without_an_offset_are_read_in_the_given_time_zone(string written, string instant) =>
        Read(written, CsvLog.Columns with { TimeZone = CsvLog.Berlin }).Should().Be(Instant(instant));

    [Fact]
    public void Given_formats_are_tried_in_order_in_the_invariant_culture()
    {
        var columns = CsvLog.Columns with { TimeZone = CsvLog.Berlin, TimeFormats = ["dd.MM.yyyy HH:mm", "d MMM yyyy H:mm zzz", "MM/dd/yyyy HH:mm:ssK"] };

        var events = CsvLog.Read(
            "crate,scanned_at,stage\nc1,06.05.2024 14:30,a\nc1,6 May 2024 9:05 -04:00,b\nc1,05/07/2024 14:30:00Z,c\nc1,05/07/2024 14:30:00,d\nc1,07.05.2024 15:00,e\n",
            columns);

        events.Select(read => read.Time).Should().Equal(
            Instant("2024-05-06T12:30:00Z"), Instant("2024-05-06T13:05:00Z"), Instant("2024-05-07T14:30:00Z"),
            Instant("2024-05-07T12:30:00Z"), Instant("2024-05-07T13:00:00Z"));
    }

    [Theory]
    [InlineData("06.05.2024 14:30")]
    [InlineData("2024-13-06")]
    [InlineData("2024-02-30T10:00Z")]
    [InlineData("1714998600")]
    [InlineData("")]
    [InlineData("2024-05-06T25:00Z")]
    public void Unreadable_times_are_refused_with_line_and_text(string written)
    {
        var fault = CsvLog.OnlyFaultOf($"crate,scanned_at,stage\nc1,2024-01-01T08:00Z,a\nc1,{written},b\n");

        fault.Kind.Should().Be(LogFaultKind.UnreadableTime);
        fault.Lines.Should().Equal(3);
        fault.Message.Should().Be(
            $"The time '{written}' on line 3 cannot be read as ISO 8601, such as 2024-05-06T14:30:00+02:00. Correct it, or give its format in EventLogColumns.TimeFormats.");
    }

    [Fact]
    public void A_refused_time_names_the_formats_it_was_tried_in() =>
        CsvLog.OnlyFaultOf("crate,scanned_at,stage\nc1,2024-01-01,a\n", CsvLog.Columns with { TimeFormats = ["dd.MM.yyyy", "d/M/yy"] })
            .Message.Should().Be("The time '2024-01-01' on line 2 cannot be read as 'dd.MM.yyyy', 'd/M/yy'. Correct it, or give its format in EventLogColumns.TimeFormats.");

    [Fact]
    public void A_very_long_field_is_quoted_in_part() =>
        CsvLog.OnlyFaultOf($"crate,scanned_at,stage\nc1,{new string('x', 500)},a\n").Message.Should().Contain($"'{new string('x', 60)}…'");

    [Fact]
    public void A_time_without_an_offset_is_refused_when_no_time_zone_is_given() =>
        CsvLog.OnlyFaultOf("crate,scanned_at,stage\nc1,2024-01-01T08:00,a\n").Message.Should().Be(
            "The time '2024-01-01T08:00' on line 2 has no offset, so it names no instant. Give its time zone in EventLogColumns.TimeZone.");

    [Fact]
    public void A_time_that_clocks_skip_is_refused() =>
        CsvLog.OnlyFaultOf("crate,scanned_at,stage\nc1,2024-03-31T02:30,a\n", CsvLog.Columns with { TimeZone = CsvLog.Berlin, AmbiguousTimes = AmbiguousTimes.Later })
            .Message.Should().Be(
                "The time '2024-03-31T02:30' on line 2 never comes in Europe/Berlin: clocks are set forward past it. Correct it, or write its offset.");

    [Fact]
    public void A_time_that_comes_twice_is_refused_unless_a_choice_is_made()
    {
        const string Csv = "crate,scanned_at,stage\nc1,2024-10-27T02:30,a\n";
        var columns = CsvLog.Columns with { TimeZone = CsvLog.Berlin };

        CsvLog.OnlyFaultOf(Csv, columns).Message.Should().Be(
            "The time '2024-10-27T02:30' on line 2 comes twice in Europe/Berlin: clocks are set back over it. Write its offset, or choose in EventLogColumns.AmbiguousTimes.");
        CsvLog.Read(Csv, columns with { AmbiguousTimes = AmbiguousTimes.Earlier })[0].Time.Should().Be(Instant("2024-10-27T00:30:00Z"));
        CsvLog.Read(Csv, columns with { AmbiguousTimes = AmbiguousTimes.Later })[0].Time.Should().Be(Instant("2024-10-27T01:30:00Z"));
    }

    [Fact]
    public void A_time_zone_that_reaches_beyond_the_first_year_is_refused() =>
        CsvLog.OnlyFaultOf("crate,scanned_at,stage\nc1,0001-01-01,a\n", CsvLog.Columns with { TimeZone = TimeZoneInfo.CreateCustomTimeZone("east", TimeSpan.FromHours(5), null, null) })
            .Kind.Should().Be(LogFaultKind.UnreadableTime);

    private static DateTimeOffset Read(string written, EventLogColumns columns) =>
        CsvLog.Read($"crate,scanned_at,stage\nc1,{written},a\n", columns).Should().ContainSingle().Which.Time;

    private static DateTimeOffset Instant(string text) => DateTimeOffset.Parse(text, CultureInfo.InvariantCulture);
}
