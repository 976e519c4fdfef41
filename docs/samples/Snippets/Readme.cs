using Stochastic.Chains;

namespace Snippets;

internal static class Readme
{
    public static void Example()
    {
        #region example
        // A pool of reusable crates. One step is a week; the figures are invented.
        Chain<string> pool = Chain.Build<string>(rows => rows
            .Row("clean", ("clean", 0.20), ("at shop", 0.80))
            .Row("at shop", ("at shop", 0.50), ("dirty", 0.49), ("lost", 0.01))
            .Row("dirty", ("clean", 1.00))
            .Row("lost", ("lost", 1.00)));

        double cleanSoon = pool.StartingIn("dirty").After(8)["clean"];
        // Proved to be right to twelve digits, or an exception:
        HittingTimes<string> untilLost = pool.TimeTo("lost").Require(relativeError: 1e-12);

        Console.WriteLine($"Clean in eight weeks: {cleanSoon:P1}");
        Console.WriteLine($"Weeks until lost: {untilLost.Mean("clean"):F1}");
        #endregion
    }
}
