using Stochastic.Chains;

namespace Snippets;

internal static class ChangingAChain
{
    public static void Shift()
    {
        var pool = InventedChains.Pool;
        #region shift
        Chain<string> fewerLosses = pool.Shift("at shop", "dirty", amount: 0.005, takenFrom: "lost");

        double today = pool.TimeToAny(["lost", "scrapped"]).Mean("clean");
        double then = fewerLosses.TimeToAny(["lost", "scrapped"]).Mean("clean");
        Console.WriteLine($"If losses at shops halve, a clean crate stays for {then:F0} weeks instead of {today:F0}");
        #endregion
    }

    public static void Fewer()
    {
        var pool = InventedChains.Pool;
        #region fewer
        Chain<string> inUse = pool.Without("lost", "scrapped");
        Chain<string> atWork = inUse.Censor("clean", "at shop");

        Console.WriteLine(inUse.Stationary());
        Console.WriteLine(atWork);
        #endregion
    }

    public static void Lump()
    {
        var pool = InventedChains.Pool;
        #region lump
        var verdict = pool.Lumpability(state => state is "clean" or "dirty" ? "in house" : state);
        Chain<string> gone = pool.Lump(state => state is "lost" or "scrapped" ? "gone" : state);

        Console.WriteLine(verdict);
        Console.WriteLine(gone.StateCount);
        #endregion
    }
}
