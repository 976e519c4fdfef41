using Stochastic.Chains;

namespace Snippets;

internal static class CountingALog
{
    // Invented scans.
    private const string Scans = """
        crate,scanned_at,stage
        C0417,2025-03-31T07:12:00+02:00,at shop
        C0418,2025-03-31T07:13:00+02:00,dirty
        C0417,2025-04-08T09:40:00+02:00,dirty
        C0418,2025-04-09T10:05:00+02:00,clean
        C0418,2025-04-14T08:00:00+02:00,at shop
        C0419,2025-04-15T08:20:00+02:00,clean
        C0417,2025-04-17T11:30:00+02:00,clean
        C0418,2025-04-21T08:10:00+02:00,at shop
        C0417,2025-04-22T06:50:00+02:00,at shop
        C0419,2025-05-05T08:15:00+02:00,at shop
        C0419,2025-05-12T16:45:00+02:00,dirty
        C0419,2025-05-20T07:55:00+02:00,clean
        """;

    public static void File()
    {
        var path = Path.GetTempFileName();
        System.IO.File.WriteAllText(path, Scans);
        #region file
        var columns = new EventLogColumns { Item = "crate", Time = "scanned_at", State = "stage" };
        TransitionCounts<string> counts = EventLog.CountCsv(path, columns);
        Chain<string> fitted = counts.ToChain();

        Console.WriteLine(counts);
        Console.WriteLine($"Scanned at the shop, a crate is next scanned dirty with probability {fitted["at shop", "dirty"]:F2}");
        #endregion
        System.IO.File.Delete(path);
    }

    public static void Weeks()
    {
        using var scans = new StringReader(Scans);
        var columns = new EventLogColumns { Item = "crate", Time = "scanned_at", State = "stage" };
        #region weeks
        var options = new LogOptions<string>
        {
            Period = LogPeriod.Weeks(1, TimeZoneInfo.Utc),
            Silence = new SilenceRule<string>(TimeSpan.FromDays(21), "lost"),
        };
        TransitionCounts<string> counts = EventLog.CountCsv(scans, columns, options);

        Console.WriteLine(counts);
        foreach (string assumption in counts.Log!.Assumptions)
        {
            Console.WriteLine($"Assumed: {assumption}");
        }
        #endregion
    }

    public static void Events()
    {
        #region events
        // From a database, a queue, a list of your own: one event for each time an item was seen in a state.
        LogEvent<int, Stage>[] inspections =
        [
            new(17, new DateTimeOffset(2025, 1, 6, 8, 0, 0, TimeSpan.Zero), Stage.New),
            new(17, new DateTimeOffset(2025, 3, 3, 8, 0, 0, TimeSpan.Zero), Stage.Worn),
            new(23, new DateTimeOffset(2025, 1, 7, 8, 0, 0, TimeSpan.Zero), Stage.New),
            new(23, new DateTimeOffset(2025, 2, 4, 8, 0, 0, TimeSpan.Zero), Stage.Worn),
            new(23, new DateTimeOffset(2025, 3, 25, 8, 0, 0, TimeSpan.Zero), Stage.Failed),
        ];
        // The log is complete up to the end of March.
        var months = new LogOptions<Stage> { Period = LogPeriod.Months(1, TimeZoneInfo.Utc), LogEnd = new DateTimeOffset(2025, 4, 1, 0, 0, 0, TimeSpan.Zero) };

        Console.WriteLine(TransitionCounts.FromEvents(inspections, months));
        #endregion
    }

    public static void Paths()
    {
        #region paths
        TransitionCounts<string> counts = TransitionCounts.FromPaths(
        [
            ["due", "reminded", "paid"],
            ["due", "paid"],
            ["due", "reminded", "reminded", "written off"],
        ]);

        Console.WriteLine($"Never left: {string.Join(", ", counts.NeverLeftStates)}");
        try
        {
            _ = counts.ToChain();
        }
        catch (InvalidChainException unknown)
        {
            Console.WriteLine(unknown.Faults[0].Message);
        }

        Chain<string> fitted = counts.ToChain(UnobservedStates.Absorbing);
        Console.WriteLine($"Paid in the end: {fitted.Absorption().Probability("due", "paid"):P0}");
        #endregion
    }

    public static void WrongLog()
    {
        var columns = new EventLogColumns { Item = "crate", Time = "scanned_at", State = "stage" };
        #region wrong-log
        using var scans = new StringReader("""
            crate,scanned_at,stage
            C0417,2025-03-31T07:12:00+02:00,at shop
            C0418,31.03.2025 07:13,dirty
            C0419,2025-03-31T07:14:00+02:00,
            """);
        try
        {
            _ = EventLog.CountCsv(scans, columns);
        }
        catch (EventLogException refused)
        {
            Console.WriteLine(refused.Message);
        }
        #endregion
    }
}
