using Stochastic.Chains;

namespace CratePool.Report;

/// <summary>How long until a crate is first in the stage the user cares for, such as at a shop.</summary>
internal static class GoalSection
{
    internal static void Write(TextWriter output, Pool pool, Evidence evidence)
    {
        var goal = pool.Options.GoalStage;
        output.Heading($"How long until a crate is first \"{goal.Stage}\"");
        if (!pool.Chains.Life.States.Contains(goal.Stage))
        {
            output.Paragraph($"Not answered: {pool.Unasked(goal)}");
            return;
        }

        var (life, stages) = (pool.Chains.Life, pool.Chains.Stages);
        var itself = life.TimeTo(goal.Stage, evidence.Options);
        var place = (pool.Chains.Refilled ?? life).TimeTo(goal.Stage, evidence.Options);
        evidence.Add($"chances of getting \"{goal.Stage}\"", itself.Certificate);
        evidence.Add($"weeks until first \"{goal.Stage}\"", place.Certificate);
        var isCertain = stages.InUse.All(stage => itself.ReachingProbability(stage) == 1);
        output.Paragraph(
            isCertain
                ? "Every crate gets there in the end."
                : $"Not every crate gets \"{goal.Stage}\" before its life ends, so two figures belong together: the chance that the crate itself " +
                  "gets there, and the mean time until it, or the new crate that took its place, is there.");
        var table = new PlainTable("stage today", "gets there itself", isCertain ? "weeks on average" : "weeks until it or its replacement is there");
        foreach (var stage in stages.InUse.Where(stage => stage != goal.Stage))
        {
            table.Add(stage, Percent.Column(itself.ReachingProbability(stage)), Prose.OneDecimal(place.Mean(stage)));
        }

        table.Write(output);
    }
}
