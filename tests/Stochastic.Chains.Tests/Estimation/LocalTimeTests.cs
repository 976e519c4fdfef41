using System.Globalization;
using Stochastic.Chains.Estimation;

namespace Stochastic.Chains.Tests.Estimation;

/// <summary>Changes of clocks as the IANA time zone database records them.</summary>
public sealed class LocalTimeTests
{
    [Theory]
    [InlineData("Europe/Berlin", "2024-03-31", "2024-03-31T00:00+01:00")]    // 02:00 to 03:00 later that day
    [InlineData("Europe/Berlin", "2024-04-01", "2024-04-01T00:00+02:00")]
    [InlineData("Europe/Berlin", "2024-10-27", "2024-10-27T00:00+02:00")]    // 03:00 to 02:00 later that day
    [InlineData("Europe/Berlin", "2024-10-28", "2024-10-28T00:00+01:00")]
    [InlineData("America/Sao_Paulo", "2018-11-03", "2018-11-03T00:00-03:00")]
    [InlineData("America/Sao_Paulo", "2018-11-04", "2018-11-04T01:00-02:00")] // 00:00 to 01:00: midnight is skipped
    [InlineData("America/Sao_Paulo", "2018-02-18", "2018-02-18T00:00-03:00")] // 00:00 to 23:00: the day begins an hour after that
    [InlineData("America/Havana", "2024-11-03", "2024-11-03T00:00-04:00")]    // 01:00 to 00:00: midnight comes twice
    [InlineData("Pacific/Apia", "2011-12-30", "2011-12-31T00:00+14:00")]      // a day that was skipped
    [InlineData("Pacific/Apia", "2011-12-31", "2011-12-31T00:00+14:00")]
    [InlineData("Australia/Lord_Howe", "2024-04-07", "2024-04-07T00:00+11:00")] // 02:00 to 01:30 later that day
    [InlineData("Asia/Kathmandu", "2024-01-01", "2024-01-01T00:00+05:45")]
    public void A_day_begins_with_its_first_instant(string zone, string date, string start) =>
        LocalTime.StartOfDay(DateOnly.Parse(date, CultureInfo.InvariantCulture), TimeZoneInfo.FindSystemTimeZoneById(zone))
            .Should().Be(Scans.At(start).UtcTicks);

    [Theory]
    [InlineData("2024-03-31T01:59:59", "2024-03-31T01:59:59+01:00", "2024-03-31T01:59:59+01:00")]
    [InlineData("2024-03-31T03:00:00", "2024-03-31T03:00:00+02:00", "2024-03-31T03:00:00+02:00")]
    [InlineData("2024-10-27T01:59:59", "2024-10-27T01:59:59+02:00", "2024-10-27T01:59:59+02:00")]
    [InlineData("2024-10-27T02:00:00", "2024-10-27T02:00:00+02:00", "2024-10-27T02:00:00+01:00")]
    [InlineData("2024-10-27T02:59:59", "2024-10-27T02:59:59+02:00", "2024-10-27T02:59:59+01:00")]
    [InlineData("2024-10-27T03:00:00", "2024-10-27T03:00:00+01:00", "2024-10-27T03:00:00+01:00")]
    [InlineData("2024-07-01T12:00:00", "2024-07-01T12:00:00+02:00", "2024-07-01T12:00:00+02:00")]
    public void A_local_time_comes_once_or_twice(string local, string earlier, string later) =>
        LocalTime.Instants(DateTime.Parse(local, CultureInfo.InvariantCulture), Scans.Berlin)
            .Should().Be((Scans.At(earlier).UtcTicks, Scans.At(later).UtcTicks));

    [Theory]
    [InlineData("2024-03-31T02:00:00")]
    [InlineData("2024-03-31T02:59:59")]
    public void A_local_time_that_clocks_skip_never_comes(string local) =>
        LocalTime.Instants(DateTime.Parse(local, CultureInfo.InvariantCulture), Scans.Berlin).Should().Be(((long?)null, (long?)null));

    [Fact]
    public void Any_hour_of_a_skipped_day_never_comes() =>
        LocalTime.Instants(new DateTime(2011, 12, 30, 15, 0, 0), TimeZoneInfo.FindSystemTimeZoneById("Pacific/Apia")).Earlier.Should().BeNull();
}
