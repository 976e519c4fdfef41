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

    public static void IfReached()
    {
        var pool = InventedChains.Pool;
        #region if-reached
        HittingTimes<string> untilLost = pool.TimeTo("lost");

        Console.WriteLine($"Those that get lost are in the pool for {untilLost.MeanIfReached("clean"):F1} weeks on average");
        #endregion
    }

    public static void Spread()
    {
        var pump = InventedChains.Pump;
        #region spread
        HittingTimes<Stage> untilFailed = pump.TimeTo(Stage.Failed);
        PassageTimeDistribution<Stage> times = untilFailed.Distribution(Stage.New, maxSteps: 52);

        Console.WriteLine($"Mean {untilFailed.Mean(Stage.New):F1}, standard deviation {untilFailed.StandardDeviation(Stage.New):F1} weeks");
        Console.WriteLine($"One in ten fails within {untilFailed.Quantile(Stage.New, 0.1)} weeks, half within {untilFailed.Quantile(Stage.New, 0.5)}");
        Console.WriteLine($"Still running after a year: {times.SurvivalProbability(52):P2}");
        #endregion
    }

    public static void Visits()
    {
        var pool = InventedChains.Pool;
        #region visits
        ExpectedVisits<string> life = pool.TimeToAny(["lost", "scrapped"]).VisitsFrom("clean");

        Console.WriteLine($"Weeks at a shop: {life["at shop"]:F1}, in repair: {life["in repair"]:F2}");
        #endregion
    }

    public static void Before()
    {
        var pool = InventedChains.Pool;
        #region before
        FirstOfTwo<string> race = pool.Before("in repair", "lost");

        Console.WriteLine($"A clean crate is repaired before it is lost: {race.Probability("clean"):P1}");
        #endregion
    }
}
