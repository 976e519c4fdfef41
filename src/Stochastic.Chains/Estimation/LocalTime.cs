namespace Stochastic.Chains.Estimation;

/// <summary>
/// Finds the instants of local times from offsets at instants alone, which every zone has exactly one of: whatever clocks do, be it a
/// change of an hour at midnight or a whole day skipped. One change of offset within 32 hours is provided for.
/// </summary>
internal static class LocalTime
{
    private const long Window = 16 * TimeSpan.TicksPerHour; // no zone was ever further from UTC

    /// <summary>The instants at which clocks show a local time, in UTC ticks: both null where they skip it, the same one where it comes once.</summary>
    internal static (long? Earlier, long? Later) Instants(DateTime local, TimeZoneInfo zone)
    {
        var (before, after) = Offsets(local.Ticks, zone);
        if (before == after)
        {
            return (local.Ticks - before, local.Ticks - before);
        }

        long? first = Offset(local.Ticks - before, zone) == before ? local.Ticks - before : null;
        long? second = Offset(local.Ticks - after, zone) == after ? local.Ticks - after : null;
        return (first ?? second, second ?? first);
    }

    /// <summary>The first instant of a local day, in UTC ticks: the earlier midnight of two, or where clocks land when they skip it.</summary>
    internal static long StartOfDay(DateOnly date, TimeZoneInfo zone)
    {
        var midnight = date.ToDateTime(TimeOnly.MinValue).Ticks;
        var (before, after) = Offsets(midnight, zone);
        if (before == after)
        {
            return midnight - before;
        }

        var change = FindChange(midnight - Window, midnight + Window, before, zone);
        if (midnight - before < change)
        {
            return midnight - before;
        }

        return Math.Max(change, midnight - after);
    }

    private static (long Before, long After) Offsets(long local, TimeZoneInfo zone) => (Offset(local - Window, zone), Offset(local + Window, zone));

    private static long Offset(long ticks, TimeZoneInfo zone) =>
        zone.GetUtcOffset(new DateTime(Math.Clamp(ticks, DateTime.MinValue.Ticks, DateTime.MaxValue.Ticks), DateTimeKind.Utc)).Ticks;

    /// <summary>The first instant with another offset.</summary>
    private static long FindChange(long earliest, long latest, long offsetBefore, TimeZoneInfo zone)
    {
        while (latest - earliest > 1)
        {
            var middle = earliest + ((latest - earliest) / 2);
            if (Offset(middle, zone) == offsetBefore)
            {
                earliest = middle;
            }
            else
            {
                latest = middle;
            }
        }

        return latest;
    }
}
