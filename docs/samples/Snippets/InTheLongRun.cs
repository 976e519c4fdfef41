using Stochastic.Chains;

namespace Snippets;

internal static class InTheLongRun
{
    public static void Ends()
    {
        var pool = InventedChains.Pool;
        #region ends
        LongRunMatrix<string> longRun = pool.LongRun();

        Console.WriteLine($"From clean: {longRun["clean", "lost"]:P1} lost, {longRun["clean", "scrapped"]:P1} scrapped");
        Console.WriteLine($"From in repair: {longRun["in repair", "lost"]:P1} lost, {longRun["in repair", "scrapped"]:P1} scrapped");
        #endregion
    }

    public static void OneStart()
    {
        var pool = InventedChains.Pool;
        #region one-start
        var today = Distribution.FromWeights(pool.States, ("clean", 1200), ("in repair", 300));
        LongRunDistribution<string> inTheEnd = pool.StartingIn(today).LongRun();

        Console.WriteLine($"Lost: {inTheEnd["lost"]:P1}; settles: {inTheEnd.HasLimit}");
        #endregion
    }

    public static void Cycle()
    {
        #region cycle
        // Invented: a machine runs in the early and the late shift in turn; a new one waits until it is connected.
        Chain<string> machine = Chain.Build<string>(rows => rows
            .Row("waiting", ("waiting", 0.5), ("early", 0.5))
            .Row("early", ("late", 1.0))
            .Row("late", ("early", 1.0)));
        LongRunDistribution<string> longRun = machine.StartingIn("waiting").LongRun();

        Console.WriteLine($"Share of early shifts: {longRun["early"]:F4}; settles: {longRun.HasLimit}; period {longRun.Period}");
        Console.WriteLine($"After an even number of shifts: {longRun.AtPhase(0)["early"]:F4} early");
        Console.WriteLine($"After an odd number of shifts: {longRun.AtPhase(1)["early"]:F4} early");
        #endregion
    }
}
