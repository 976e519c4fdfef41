namespace CratePool;

/// <summary>What the user asks: which log, how to read it, and which of its stages the questions are about.</summary>
internal sealed record PoolOptions
{
    internal required string LogPath { get; init; }

    /// <summary>Whether the log is the invented one of the sample.</summary>
    internal required bool IsInvented { get; init; }

    internal required string OutputFolder { get; init; }

    internal required string CrateColumn { get; init; }

    internal required string TimeColumn { get; init; }

    internal required string StageColumn { get; init; }

    /// <summary>How times are written, as .NET format strings; empty for ISO 8601.</summary>
    internal required IReadOnlyList<string> TimeFormats { get; init; }

    internal required char Separator { get; init; }

    /// <summary>The time zone of weeks and of times without an offset; null for weeks in UTC and times that all have one.</summary>
    internal required TimeZoneInfo? Zone { get; init; }

    /// <summary>The stage a new crate starts in.</summary>
    internal required StageChoice NewStage { get; init; }

    /// <summary>The stage whose first time is asked for.</summary>
    internal required StageChoice GoalStage { get; init; }

    /// <summary>The stages in which a crate's life ends by decision.</summary>
    internal required IReadOnlyList<StageChoice> ScrappedStages { get; init; }

    /// <summary>The stage that a crate is counted in when it was not scanned for a long time.</summary>
    internal required string LostStage { get; init; }

    /// <summary>After how many weeks without a scan a crate counts as lost; 0 for never.</summary>
    internal required int LostAfterWeeks { get; init; }

    /// <summary>The stages that end a crate's life, whether or not the log has them.</summary>
    internal IEnumerable<string> EndStages => ScrappedStages.Select(choice => choice.Stage).Prepend(LostStage).Distinct();
}

/// <summary>A stage that a question is about.</summary>
/// <param name="Option">The option that names it.</param>
/// <param name="Stage">Its name in the log.</param>
/// <param name="IsGiven">Whether the user named it. A name that is only assumed need not occur in the log.</param>
internal readonly record struct StageChoice(string Option, string Stage, bool IsGiven);
