using Stochastic.Chains;

namespace Snippets;

internal static class HowLongUntil
{
    public static void Mean()
    {
        var pump = InventedChains.Pump;
        #region mean
        HittingTimes<Stage> untilFailed = pump.TimeTo(Stage.Failed);

        Console.WriteLine(untilFailed);
        Console.WriteLine($"A new pump runs for {untilFailed.Mean(Stage.New):F1} weeks on average");
        #endregion
    }

    public static void AnyOf()
    {
        var pool = InventedChains.Pool;
        #region any-of
        HittingTimes<string> untilGone = pool.TimeToAny(["lost", "scrapped"]);

        Console.WriteLine($"A clean crate stays in the pool for {untilGone.Mean("clean"):F1} weeks on average");
        #endregion
    }

    public static void MayNeverHappen()
    {
        var pool = InventedChains.Pool;
        #region may-never-happen
        HittingTimes<string> untilLost = pool.TimeTo("lost");

        Console.WriteLine($"Mean weeks until lost: {untilLost.Mean("clean")}");
        Console.WriteLine($"Probability of ever being lost: {untilLost.ReachingProbability("clean"):P2}");
        #endregion
    }

    public static void Hours()
    {
        var plant = InventedChains.Plant;
        #region hours
        HittingTimes<string> untilNoneRuns = plant.TimeTo("none runs");

        Console.WriteLine($"Hours until both pumps stand still: {untilNoneRuns.Mean("both run"):F0}");
        Console.WriteLine($"Proved to twelve digits: {untilNoneRuns.Certificate is { IsProof: true, RelativeErrorBound: <= 1e-12 }}");
        #endregion
    }
}
