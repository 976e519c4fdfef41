using Stochastic.Chains;

namespace CratePool;

/// <summary>Reads the scan log and counts its weekly moves.</summary>
internal static class PoolLog
{
    private const int DaysPerWeek = 7;

    /// <summary>Counts from Monday to Monday.</summary>
    /// <exception cref="EventLogException">The log cannot be read as it is; the message lists all that is wrong with it.</exception>
    internal static TransitionCounts<string> Count(PoolOptions options, IProgress<SolveProgress> progress, CancellationToken cancellation)
    {
        var columns = new EventLogColumns
        {
            Item = options.CrateColumn,
            Time = options.TimeColumn,
            State = options.StageColumn,
            TimeFormats = options.TimeFormats,
            Separator = options.Separator,
            TimeZone = options.Zone,
        };
        return EventLog.CountCsv(options.LogPath, columns, new LogOptions<string>
        {
            Period = LogPeriod.Weeks(1, options.Zone ?? TimeZoneInfo.Utc),
            Silence = options.LostAfterWeeks > 0
                ? new SilenceRule<string>(TimeSpan.FromDays(DaysPerWeek * options.LostAfterWeeks), options.LostStage)
                : null,
            FinalStates = [.. options.ScrappedStages.Select(choice => choice.Stage)],
            Progress = progress,
            CancellationToken = cancellation,
        });
    }
}
