using Stochastic.Chains;

namespace Snippets;

internal static class WhereItSettles
{
    public static void Shares()
    {
        var pump = InventedChains.Pump;
        #region shares
        StationaryDistribution<Stage> shares = pump.Stationary();

        Console.WriteLine(shares);
        Console.WriteLine($"Weeks in which a pump stands still: {shares[Stage.Failed]:P2}");
        #endregion
    }

    public static void Cost()
    {
        var pump = InventedChains.Pump;
        #region cost
        // Cost of a week in each stage; invented figures.
        double perWeek = pump.Stationary()
            .Expectation(stage => stage switch { Stage.New => 40, Stage.Worn => 65, _ => 2100 });

        Console.WriteLine($"Cost of an average week: {perWeek:F2}");
        #endregion
    }

    public static void RareState()
    {
        var plant = InventedChains.Plant;
        #region rare-state
        StationaryDistribution<string> shares = plant.Stationary();

        Console.WriteLine($"Hours in a year without any pump: {8766 * shares["none runs"]:G4}");
        Console.WriteLine($"Proved to twelve digits: {shares.Certificate is { IsProof: true, RelativeErrorBound: <= 1e-12 }}");
        #endregion
    }

    public static void SeveralEnds()
    {
        var pool = InventedChains.Pool;
        #region several-ends
        try
        {
            Console.WriteLine(pool.Stationary());
        }
        catch (ChainStructureException noSingleAnswer)
        {
            Console.WriteLine(noSingleAnswer.Message);
        }
        #endregion
    }

    public static void PerClass()
    {
        #region per-class
        // Two grades of customer that never mix once chosen; invented figures.
        Chain<string> customers = Chain.Build<string>(rows => rows
            .Row("new", ("monthly", 0.6), ("yearly", 0.4))
            .Row("monthly", ("monthly", 0.8), ("paused", 0.2))
            .Row("paused", ("monthly", 0.5), ("paused", 0.5))
            .Row("yearly", ("yearly", 1.0)));

        foreach (StationaryDistribution<string> shares in customers.StationaryPerClass())
        {
            Console.WriteLine(string.Join(", ", shares.Where(pair => pair.Value > 0).Select(pair => $"{pair.Key} {pair.Value:P1}")));
        }
        #endregion
    }
}
