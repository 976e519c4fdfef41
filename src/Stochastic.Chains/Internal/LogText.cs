using System.Globalization;

namespace Stochastic.Chains.Internal;

/// <summary>Writes instants and spans of time into messages and reports, the same in every culture.</summary>
internal static class LogText
{
    /// <summary>An instant in ISO 8601, with the offset it came with.</summary>
    internal static string Instant(DateTimeOffset time) => time.ToString("yyyy-MM-dd'T'HH:mm:ss.FFFFFFFzzz", CultureInfo.InvariantCulture);

    /// <summary>A span in the largest of days, hours, minutes and seconds that makes it a whole number; else as days.hours:minutes:seconds.</summary>
    internal static string Span(TimeSpan span) => span.Ticks switch
    {
        var ticks when ticks % TimeSpan.TicksPerDay == 0 => Text.Count(ticks / TimeSpan.TicksPerDay, "day", "days"),
        var ticks when ticks % TimeSpan.TicksPerHour == 0 => Text.Count(ticks / TimeSpan.TicksPerHour, "hour", "hours"),
        var ticks when ticks % TimeSpan.TicksPerMinute == 0 => Text.Count(ticks / TimeSpan.TicksPerMinute, "minute", "minutes"),
        var ticks when ticks % TimeSpan.TicksPerSecond == 0 => Text.Count(ticks / TimeSpan.TicksPerSecond, "second", "seconds"),
        _ => span.ToString("c", CultureInfo.InvariantCulture),
    };
}
