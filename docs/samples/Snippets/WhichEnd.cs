using Stochastic.Chains;

namespace Snippets;

internal static class WhichEnd
{
    public static void Ends()
    {
        var pool = InventedChains.Pool;
        #region ends
        Absorption<string> ends = pool.Absorption();

        Console.WriteLine(ends);
        Console.WriteLine($"A clean crate ends up lost: {ends.Probability("clean", "lost"):P2}");
        Console.WriteLine($"Weeks until it ends: {ends.MeanSteps("clean"):F1}");
        #endregion
    }

    public static void Stock()
    {
        var pool = InventedChains.Pool;
        #region stock
        Absorption<string> ends = pool.Absorption();
        var today = new Dictionary<string, int> { ["clean"] = 1200, ["at shop"] = 2600, ["dirty"] = 200 };
        double lost = today.Sum(pair => pair.Value * ends.Probability(pair.Key, "lost"));

        Console.WriteLine($"Of 4000 crates, {lost:F0} are expected to end up lost");
        #endregion
    }

    public static void NotAnEnd()
    {
        var pool = InventedChains.Pool;
        #region not-an-end
        try
        {
            Console.WriteLine(pool.Absorption().Probability("clean", "in repair"));
        }
        catch (ChainStructureException noEnd)
        {
            Console.WriteLine(noEnd.Message);
        }

        Console.WriteLine($"{pool.TimeTo("in repair").ReachingProbability("clean"):P1}");
        #endregion
    }

    public static void Visits()
    {
        var pool = InventedChains.Pool;
        #region visits
        Absorption<string> ends = pool.Absorption();

        Console.WriteLine($"A clean crate leaves after {ends.MeanSteps("clean"):F1} weeks, give or take {ends.StandardDeviationOfSteps("clean"):F1}");
        Console.WriteLine($"It spends {ends.ExpectedVisits("clean", "dirty"):F1} of them dirty");
        Console.WriteLine($"One in twenty is gone within {ends.Steps.Quantile("clean", 0.05)} weeks");
        #endregion
    }

    public static void Given()
    {
        var pool = InventedChains.Pool;
        #region given
        Absorption<string> ends = pool.Absorption();
        Chain<string> thoseScrapped = ends.Conditional("scrapped");

        Console.WriteLine($"Weeks of those that are lost: {ends.StepsIfInto("lost").Mean("clean"):F1}");
        Console.WriteLine($"Weeks of those that are scrapped: {ends.StepsIfInto("scrapped").Mean("clean"):F1}");
        Console.WriteLine($"Of those that are scrapped, dirty ones go into repair: {thoseScrapped["dirty", "in repair"]:P1}");
        #endregion
    }

    public static void StillIn()
    {
        var pool = InventedChains.Pool;
        #region still-in
        QuasiStationaryDistribution<string> inUse = pool.QuasiStationary();

        Console.WriteLine($"Of those still in, {inUse["dirty"]:P1} are dirty");
        Console.WriteLine($"Every week {inUse.DecayRate:P2} of them leave for good");
        #endregion
    }
}
