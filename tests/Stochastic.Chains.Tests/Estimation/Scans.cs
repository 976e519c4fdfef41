using System.Globalization;

namespace Stochastic.Chains.Tests.Estimation;

/// <summary>Writes invented logs in short: "crate 2024-01-31T10:00 state", in UTC unless an offset is written.</summary>
internal static class Scans
{
    internal static TimeZoneInfo Berlin { get; } = TimeZoneInfo.FindSystemTimeZoneById("Europe/Berlin");

    internal static DateTimeOffset At(string time) => DateTimeOffset.Parse(time, CultureInfo.InvariantCulture, DateTimeStyles.AssumeUniversal);

    internal static LogEvent<string, string>[] Of(params string[] lines) => [.. lines.Select(line =>
    {
        var parts = line.Split(' ');
        return new LogEvent<string, string>(parts[0], At(parts[1]), parts[2]);
    })];

    internal static TransitionCounts<string> Count(LogOptions<string> options, params string[] lines) => TransitionCounts.FromEvents(Of(lines), options);

    /// <summary>The counted moves as "from>to count", in state order.</summary>
    internal static string[] Moves(this TransitionCounts<string> counts) =>
        [.. counts.Moves.Select(move => $"{move.From}>{move.To} {move.Count.ToString(CultureInfo.InvariantCulture)}")];
}
