namespace CratePool.Report;

/// <summary>What was found in the log, and what was assumed in counting it.</summary>
internal static class LogSection
{
    internal static void Write(TextWriter output, Pool pool)
    {
        var (counts, log) = (pool.Counts, pool.Log);
        output.Heading("What the log holds");
        output.Paragraph(
            $"{(pool.Options.IsInvented ? "The invented log of the sample" : pool.Options.LogPath)}: {Prose.Count(log.Events, "scan", "scans")} of {Prose.Count(log.Items, "crate", "crates")}, " +
            $"from {Prose.Date(log.FirstTime)} to {Prose.Date(log.LastTime)}.");
        var found = new PlainTable("found", "");
        found.Add("scans", Prose.Count(log.Events));
        found.Add("of these repeated rows, counted once", Prose.Count(log.DuplicateEvents));
        found.Add("crates", Prose.Count(log.Items));
        found.Add("in use when the log ends", Prose.Count(log.OpenItems));
        found.Add($"last scanned as {Prose.List([.. pool.Options.EndStages.Reverse()], "or")}", Prose.Count(log.FinishedItems));
        found.Add($"not scanned any more, so taken as {pool.Options.LostStage}", Prose.Count(log.SilentItems));
        found.Add("scanned only once, so never seen to move", Prose.Count(log.SingleEventItems));
        found.Add("weekly moves counted, stays included", Prose.Count(counts.TotalCount));
        found.Add("of these unobserved: no scan in the week, taken as a stay", Prose.Count(log.FilledPeriods));
        found.Add("scans passed over, the crate moved on in the same week", Prose.Count(log.PassedOverEvents));
        found.Add("scans after the last complete week, not counted", Prose.Count(log.UnfinishedPeriodEvents));
        found.Write(output);
        foreach (var assumption in log.Assumptions)
        {
            output.Paragraph("Assumed: " + assumption);
        }

        output.Paragraph("The stages, how many crates are in each now, and how the crates in a stage move within a week:");
        WriteStages(output, pool);
    }

    private static void WriteStages(TextWriter output, Pool pool)
    {
        var (life, stages) = (pool.Chains.Life, pool.Chains.Stages);
        var table = new PlainTable("stage", "crates now", "moves seen out of it", "stays", "most often next", "chance");
        foreach (var stage in stages.InUse)
        {
            var moves = life.TransitionsFrom(stage).Where(move => move.To != stage).OrderByDescending(move => move.Probability).ToList();
            table.Add(
                stage,
                Prose.Count(pool.Stock(stage)),
                Prose.Count(pool.Counts.TotalFrom(stage)),
                Percent.Column(life[stage, stage]),
                moves.Count > 0 ? moves[0].To : "none seen",
                moves.Count > 0 ? Percent.Column(moves[0].Probability) : "-");
        }

        table.Write(output);
        foreach (var neverLeft in stages.InUse.Where(stage => life[stage, stage] == 1))
        {
            output.Paragraph($"No crate was ever seen to leave \"{neverLeft}\". If a crate's life ends there, name it with --scrapped.");
        }

        var returned = stages.Ends.Sum(pool.Counts.TotalFrom) - stages.Ends.Sum(end => pool.Counts[end, end]);
        if (returned > 0)
        {
            output.Paragraph(
                $"{Prose.Count(returned, "crate was", "crates were")} seen again after being {Prose.List(stages.Ends, "or")}; the answers are about the first time.");
        }
    }
}
