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
}
