namespace Stochastic.Chains.Tests.Interchange;

/// <summary>Reads invented CSV logs of crates.</summary>
internal static class CsvLog
{
    internal static EventLogColumns Columns { get; } = new() { Item = "crate", Time = "scanned_at", State = "stage" };

    internal static TimeZoneInfo Berlin { get; } = TimeZoneInfo.FindSystemTimeZoneById("Europe/Berlin");

    internal static LogEvent<string, string>[] Read(string csv) => Read(csv, Columns);

    internal static LogEvent<string, string>[] Read(string csv, EventLogColumns columns) => [.. EventLog.ReadCsv(new StringReader(csv), columns)];

    internal static TransitionCounts<string> Count(string csv) => EventLog.CountCsv(new StringReader(csv), Columns);

    internal static LogFault[] FaultsOf(string csv) => FaultsOf(csv, Columns);

    internal static LogFault[] FaultsOf(string csv, EventLogColumns columns) =>
        [.. FluentActions.Invoking(() => EventLog.CountCsv(new StringReader(csv), columns)).Should().Throw<EventLogException>().Which.Faults];

    internal static LogFault OnlyFaultOf(string csv) => OnlyFaultOf(csv, Columns);

    internal static LogFault OnlyFaultOf(string csv, EventLogColumns columns) => FaultsOf(csv, columns).Should().ContainSingle().Which;
}
