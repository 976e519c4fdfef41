using CratePool.Report;
using Stochastic.Chains;

namespace CratePool;

/// <summary>What is known about the user's pool: its log, counted, and the chains estimated from it.</summary>
/// <param name="Options">What the user asked.</param>
/// <param name="Counts">The weekly moves of the log.</param>
/// <param name="Log">The account of the log.</param>
/// <param name="Chains">The chains of the questions.</param>
internal sealed record Pool(PoolOptions Options, TransitionCounts<string> Counts, LogReport<string> Log, PoolChains Chains)
{
    /// <summary>The crates that are neither lost nor scrapped.</summary>
    internal long CratesInUse => Chains.Stages.InUse.Sum(Stock);

    /// <summary>Makes the chains of a log that was counted.</summary>
    /// <param name="options">What the user asked.</param>
    /// <param name="counts">The weekly moves of the log.</param>
    /// <exception cref="UnusableLogException">The log lacks a stage that the user named, or shows no crate in use or no move.</exception>
    internal static Pool Of(PoolOptions options, TransitionCounts<string> counts)
    {
        var states = counts.States;
        foreach (var choice in options.ScrappedStages.Append(options.NewStage).Append(options.GoalStage))
        {
            if (choice.IsGiven && !states.Contains(choice.Stage))
            {
                throw new UnusableLogException(
                    $"No crate of the log was ever \"{choice.Stage}\". Give {choice.Option} one of the log's stages: {Prose.List([.. states], "or")}.");
            }
        }

        var log = counts.Log ?? throw new InvalidOperationException("Counts of a log carry its account.");
        string[] ends = [.. options.EndStages.Where(states.Contains)];
        if (counts.TotalCount == 0 || log.OpenItems == 0 || states.Count == ends.Length)
        {
            throw new UnusableLogException(
                $"The log shows {Prose.Count(counts.TotalCount, "weekly move", "weekly moves")} and {Prose.Count(log.OpenItems, "crate", "crates")} in use at its end, " +
                "too little to answer anything. Give a log of some more weeks.");
        }

        if (ends.Contains(options.NewStage.Stage))
        {
            throw new UnusableLogException($"A crate cannot both start and end as \"{options.NewStage.Stage}\". Give --new another stage.");
        }

        return new Pool(options, counts, log, PoolChains.Of(counts, states.Contains(options.NewStage.Stage) ? options.NewStage.Stage : null, ends));
    }

    /// <summary>The crates that are in a stage today, as last seen.</summary>
    internal long Stock(string stage) => Log.OpenItemsByState.GetValueOrDefault(stage);

    internal Distribution<string> StockOver(StateSpace<string> states) =>
        Distribution.FromWeights(states, Log.OpenItemsByState.Select(stock => (stock.Key, (double)stock.Value)));

    /// <summary>Why a question about a stage is not asked.</summary>
    internal string Unasked(StageChoice choice) =>
        $"the log has no stage \"{choice.Stage}\". Name the one you mean with {choice.Option}; the stages are {Prose.List([.. Counts.States], "and")}.";
}
