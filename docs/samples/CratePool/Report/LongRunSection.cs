using System.Globalization;
using Stochastic.Chains;

namespace CratePool.Report;

/// <summary>The shares that a pool kept full settles at.</summary>
internal static class LongRunSection
{
    internal static void Write(TextWriter output, Pool pool, Evidence evidence)
    {
        output.Heading("The long-run shares when every crate that ends is replaced");
        if (pool.Chains.Refilled is not { } refilled)
        {
            output.Paragraph($"Not answered: {pool.Unasked(pool.Options.NewStage)}");
            return;
        }

        var classes = refilled.Structure().RecurrentClasses;
        if (classes.Count > 1)
        {
            output.Paragraph(
                $"Not answered: the crates end up in one of {Prose.Count(classes.Count)} groups of stages that they never leave, and in which one depends on " +
                $"where they start: {string.Join("; ", classes.Select(group => string.Join(", ", group.States)))}.");
            return;
        }

        var stages = pool.Chains.Stages;
        var longRun = refilled.Stationary(evidence.Options);
        evidence.Add("long-run shares", longRun.Certificate);
        var start = refilled.StartingIn(pool.StockOver(refilled.States));
        var (four, thirteen) = (start.After(4, evidence.Options), start.After(13, evidence.Options));
        output.Paragraph(
            (stages.Ends.Count == 0
                ? "No stage of the log ends a crate's life, so nothing has to be replaced. "
                : $"Here the pool is kept full: a crate found to be {Prose.List(stages.Ends, "or")} counts as such for one week, then a new one " +
                  $"takes its place and is \"{pool.Options.NewStage.Stage}\". ") +
            (classes[0].Period == 1
                ? "Whatever the pool looks like today, it settles at the long-run shares."
                : $"The pool swings in a cycle of {Prose.Count(classes[0].Period)} weeks and does not settle; the long-run shares are the mean of the cycle."));
        var table = new PlainTable("stage", "today", "in 4 weeks", "in 13 weeks", "long run", "crates");
        foreach (var stage in stages.All)
        {
            table.Add(
                stage,
                Percent.Column(start.Distribution[stage]),
                Percent.Column(four[stage]),
                Percent.Column(thirteen[stage]),
                Percent.Column(longRun[stage]),
                Prose.Expected(longRun[stage] * pool.CratesInUse));
        }

        table.Write(output);
        var aWeek = stages.Ends.Sum(end => longRun[end]) * pool.CratesInUse;
        if (aWeek > 0)
        {
            output.Paragraph(string.Create(
                CultureInfo.InvariantCulture,
                $"To stay at {pool.CratesInUse:N0} crates, the pool needs about {aWeek:N1} new crates a week, or {aWeek * 52:N0} in 52 weeks."));
        }
    }
}
