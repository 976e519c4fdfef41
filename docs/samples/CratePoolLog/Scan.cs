using System.Globalization;

namespace CratePoolLog;

/// <summary>One row of the log: a crate was scanned, and what stage it was in. Times are minutes from the first Monday, local time.</summary>
/// <param name="Crate">The number of the crate, from 1.</param>
/// <param name="Minute">When it was scanned, in minutes of local time.</param>
/// <param name="UploadedMinute">When the handheld handed the scan in: the order of the rows.</param>
/// <param name="Stage">The stage it was found in.</param>
internal readonly record struct Scan(int Crate, int Minute, int UploadedMinute, Stage Stage)
{
    private static readonly DateTime FirstMonday = new(2025, 1, 6, 0, 0, 0, DateTimeKind.Unspecified);

    /// <summary>The depot's clocks go forward one hour in the night before this Sunday's morning shift.</summary>
    private static readonly DateTime SummerTime = new(2025, 3, 30, 3, 0, 0, DateTimeKind.Unspecified);

    internal string ToRow()
    {
        var time = FirstMonday.AddMinutes(Minute);
        var offset = time < SummerTime ? "+01:00" : "+02:00";
        return string.Create(CultureInfo.InvariantCulture, $"C{Crate:0000},{time:yyyy-MM-dd'T'HH:mm}:00{offset},{Name(Stage)}");
    }

    private static string Name(Stage stage) => stage switch
    {
        Stage.Clean => "clean",
        Stage.Filled => "filled",
        Stage.AtShop => "at shop",
        Stage.ReturnedDirty => "returned dirty",
        Stage.InWash => "in wash",
        Stage.InRepair => "in repair",
        Stage.Scrapped => "scrapped",
        _ => throw new ArgumentOutOfRangeException(nameof(stage), stage, "A lost crate is not scanned."),
    };
}
