using Stochastic.Chains;

namespace CratePool.Report;

/// <summary>Where the crates in use today will be in a few weeks when nothing is replaced.</summary>
internal static class ForecastSection
{
    private static readonly int[] Weeks = [4, 13];

    internal static void Write(TextWriter output, Pool pool, Evidence evidence)
    {
        var (life, stages) = (pool.Chains.Life, pool.Chains.Stages);
        var start = life.StartingIn(pool.StockOver(life.States));
        var ahead = Weeks.Select(week => (Week: week, Shares: start.After(week, evidence.Options))).ToList();
        output.Heading("Where the pool stands in 4 and 13 weeks");
        output.Paragraph(
            $"Of the {Prose.Count(pool.CratesInUse)} crates in use today, this is where they can be expected, if every week goes like " +
            "the weeks of the log and nothing is replaced.");
        var table = new PlainTable("stage", "today", "in 4 weeks", "in 13 weeks");
        foreach (var stage in stages.All)
        {
            table.Add([stage, Prose.Count(pool.Stock(stage)), .. ahead.Select(step => Prose.Expected(step.Shares[stage] * pool.CratesInUse))]);
        }

        table.Write(output);
        if (stages.Ends.Count > 0)
        {
            var gone = ahead.Select(step => stages.Ends.Sum(end => step.Shares[end])).ToList();
            output.Paragraph(
                $"So {Percent.Short(gone[0])} of them will be {Prose.List(stages.Ends, "or")} within 4 weeks, and {Percent.Short(gone[1])} within 13 weeks.");
        }

        foreach (var (week, shares) in ahead)
        {
            evidence.Add($"shares in {week} weeks", shares.Certificate);
        }
    }
}
