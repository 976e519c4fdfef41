using Stochastic.Chains;

namespace Snippets;

/// <summary>The life of an invented pump; one step is a week.</summary>
public enum Stage
{
    /// <summary>Runs as on its first day.</summary>
    New,

    /// <summary>Runs, but wears.</summary>
    Worn,

    /// <summary>Stands still until it is replaced.</summary>
    Failed,
}

/// <summary>The chains that the pages talk about. Pumps, crates and figures are invented.</summary>
internal static class InventedChains
{
    internal static Chain<Stage> Pump { get; } = MakePump();

    internal static Chain<string> Pool { get; } = MakePool();

    internal static Chain<string> Plant { get; } = MakePlant();

    private static Chain<Stage> MakePump()
    {
        #region pump
        // One step is a week; invented figures.
        Chain<Stage> pump = Chain.Build<Stage>(rows => rows
            .Row(Stage.New, (Stage.New, 0.90), (Stage.Worn, 0.10))
            .Row(Stage.Worn, (Stage.Worn, 0.75), (Stage.Failed, 0.25))
            .Row(Stage.Failed, (Stage.New, 1.00)));
        #endregion
        return pump;
    }

    private static Chain<string> MakePool()
    {
        #region pool
        // One step is a week; invented figures.
        Chain<string> pool = Chain.Build<string>(rows => rows
            .Row("clean", ("clean", 0.20), ("at shop", 0.80))
            .Row("at shop", ("at shop", 0.50), ("dirty", 0.49), ("lost", 0.01))
            .Row("dirty", ("clean", 0.95), ("in repair", 0.05))
            .Row("in repair", ("clean", 0.80), ("scrapped", 0.20))
            .Row("lost", ("lost", 1.00))
            .Row("scrapped", ("scrapped", 1.00)));
        #endregion
        return pool;
    }

    private static Chain<string> MakePlant()
    {
        #region plant
        // Two pumps, either of which is enough, and one repair crew. Moves per hour; invented figures.
        Chain<string> plant = Chain.FromRates([
            new TransitionRate<string>("both run", "one runs", 2e-4),
            new TransitionRate<string>("one runs", "both run", 0.05),
            new TransitionRate<string>("one runs", "none runs", 1e-4),
            new TransitionRate<string>("none runs", "one runs", 0.05)]);
        #endregion
        return plant;
    }
}
