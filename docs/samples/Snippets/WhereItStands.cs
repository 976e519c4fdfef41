using Stochastic.Chains;

namespace Snippets;

internal static class WhereItStands
{
    public static void OneItem()
    {
        var pool = InventedChains.Pool;
        #region one-item
        StepDistribution<string> inFourWeeks = pool.StartingIn("dirty").After(4);

        Console.WriteLine(inFourWeeks);
        Console.WriteLine($"Clean again: {inFourWeeks["clean"]:P1}");
        #endregion
    }

    public static void WholeStock()
    {
        var pool = InventedChains.Pool;
        #region whole-stock
        // What stands where today: counts, not probabilities.
        Distribution<string> today = Distribution.FromWeights(pool.States, ("clean", 1200), ("at shop", 2600), ("dirty", 200));
        StepDistribution<string> inTenWeeks = pool.StartingIn(today).After(10);

        foreach (string state in new[] { "clean", "at shop", "lost", "scrapped" })
        {
            Console.WriteLine($"{state}: {4000 * inTenWeeks[state]:F0} crates expected");
        }
        #endregion
    }

    public static void Figure()
    {
        var pool = InventedChains.Pool;
        #region figure
        // Deposits at stake: 3.20 for a lost crate, 1.10 for a scrapped one; invented figures.
        double loss = pool.StartingIn("clean").After(52)
            .Expectation(state => state switch { "lost" => 3.20, "scrapped" => 1.10, _ => 0 });

        Console.WriteLine($"Expected loss per crate in a year: {loss:F2}");
        #endregion
    }

    public static void Certificate()
    {
        var pool = InventedChains.Pool;
        #region certificate
        Certificate proof = pool.StartingIn("clean").After(52).Certificate;

        Console.WriteLine($"{proof.Method}: {proof.Iterations} steps made");
        Console.WriteLine($"Proved to twelve digits: {proof is { IsProof: true, RelativeErrorBound: <= 1e-12 }}");
        #endregion
    }
}
