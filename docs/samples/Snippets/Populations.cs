using Stochastic.Chains;

namespace Snippets;

internal static class Populations
{
    public static void Stock()
    {
        var pool = InventedChains.Pool;
        #region stock
        PopulationForecast<string> plan = pool.StartingWith(("clean", 1200), ("at shop", 2600), ("dirty", 200)).Forecast(10);

        Console.WriteLine(plan);
        Console.WriteLine($"Clean in week 10: {plan.Expected("clean", 10):F0} expected");
        #endregion
    }

    public static void Scatter()
    {
        var pool = InventedChains.Pool;
        #region scatter
        PopulationForecast<string> plan = pool.StartingWith(("clean", 120), ("at shop", 260), ("dirty", 20)).Forecast(10);
        CountDistribution clean = plan.Count("clean", 10);

        Console.WriteLine(clean);
        Console.WriteLine($"With 95 % probability at least {clean.Quantile(0.05)} are clean.");
        Console.WriteLine($"Fewer than 100: {clean.AtMost(99):P1}");
        #endregion
    }

    public static void Joining()
    {
        var pool = InventedChains.Pool;
        #region joining
        // Invented figures: 30 crates are bought every week, 500 more in week 4, and one in 500 at a shop is never seen again.
        Population<string> crates = pool.StartingWith(("clean", 1200), ("at shop", 2600))
            .WithRecruitment(("clean", 30))
            .WithRecruitmentIn(4, ("clean", 500))
            .WithLosses(("at shop", 0.002));
        PopulationForecast<string> plan = crates.Forecast(8);

        Console.WriteLine($"At shops in week 8: {plan.Expected("at shop", 8):F0}, give or take {plan.StandardDeviation("at shop", 8):F0}");
        Console.WriteLine($"Never seen again: {plan.Losses(8):F1}");
        #endregion
    }
}
