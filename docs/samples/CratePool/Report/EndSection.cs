using System.Globalization;
using Stochastic.Chains;

namespace CratePool.Report;

/// <summary>How long until a crate is lost or scrapped, and which of the two.</summary>
internal static class EndSection
{
    private const double WeeksPerYear = 52.18;

    internal static void Write(TextWriter output, Pool pool, Evidence evidence)
    {
        var (life, stages) = (pool.Chains.Life, pool.Chains.Stages);
        var ends = Prose.List(stages.Ends, "or");
        if (stages.Ends.Count == 0)
        {
            output.Heading("How long until a crate ends");
            output.Paragraph(
                $"Not answered: no crate of the log was ever {Prose.List([.. pool.Options.EndStages], "or")}. Name the stages that end a life with --scrapped.");
            return;
        }

        var time = life.TimeToAny(stages.Ends, evidence.Options);
        var which = life.Absorption(evidence.Options);
        evidence.Add($"weeks until {ends}", time.Certificate);
        evidence.Add($"chances of ending {ends}", which.Certificate);
        output.Heading($"How long until a crate is {ends}" + (stages.Ends.Count > 1 ? ", and which" : string.Empty));
        var first = stages.InUse[0];
        output.Paragraph(
            double.IsFinite(time.Mean(first))
                ? string.Create(
                    CultureInfo.InvariantCulture,
                    $"A crate that is \"{first}\" today lasts {time.Mean(first):N0} weeks on average, {time.Mean(first) / WeeksPerYear:N1} years. {Shares(which, first, stages.Ends)}")
                : $"By the moves of the log a crate that is \"{first}\" today need never be {ends}, so there is no mean time. {Shares(which, first, stages.Ends)}");
        var table = new PlainTable(["stage today", "weeks on average", "years", .. stages.Ends.Select(end => $"ends {end}")]);
        foreach (var stage in stages.InUse)
        {
            table.Add(
            [
                stage,
                Prose.OneDecimal(time.Mean(stage)),
                double.IsFinite(time.Mean(stage)) ? Prose.OneDecimal(time.Mean(stage) / WeeksPerYear) : "-",
                .. stages.Ends.Select(end => Percent.Column(which.Probability(stage, end))),
            ]);
        }

        table.Write(output);
    }

    private static string Shares(Absorption<string> which, string from, IReadOnlyList<string> ends) =>
        $"In the end {Prose.List([.. ends.Select(end => $"{Percent.Short(which.Probability(from, end))} are {end}")], "and")}.";
}
