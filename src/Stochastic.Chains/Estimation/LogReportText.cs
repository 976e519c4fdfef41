using Stochastic.Chains.Internal;

namespace Stochastic.Chains.Estimation;

/// <summary>Writes the account of a log as text.</summary>
internal static class LogReportText
{
    internal static string Write<TState>(LogReport<TState> report)
        where TState : notnull
    {
        var table = new TextTable(["Log", string.Empty]);
        table.AddRow(["events", Text.Count(report.Events)]);
        table.AddRow(["items", Text.Count(report.Items)]);
        table.AddRow(["first event", LogText.Instant(report.FirstTime)]);
        table.AddRow(["last event", LogText.Instant(report.LastTime)]);
        table.AddRow(["end of the log", LogText.Instant(report.LogEnd)]);
        table.AddRow(["moves counted", Text.Count(report.Moves)]);
        table.AddRow(["items open at the end", Text.Count(report.OpenItems)]);
        table.AddRow(["items gone silent", Text.Count(report.SilentItems)]);
        table.AddRow(["items finished", Text.Count(report.FinishedItems)]);
        table.AddRow(["items with a single event", Text.Count(report.SingleEventItems)]);
        table.AddRow(["duplicate events", Text.Count(report.DuplicateEvents)]);
        table.AddRow(["returns after silence", Text.Count(report.ReturnsAfterSilence)]);
        table.AddRow(["periods filled", Text.Count(report.FilledPeriods)]);
        table.AddRow(["events passed over", Text.Count(report.PassedOverEvents)]);
        table.AddRow(["events in the unfinished period", Text.Count(report.UnfinishedPeriodEvents)]);
        return string.Join(Environment.NewLine, [table.ToString(), .. report.Assumptions.Select(assumption => "Assumed: " + assumption)]);
    }
}
