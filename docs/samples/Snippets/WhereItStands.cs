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

    public static void Forecast()
    {
        var pool = InventedChains.Pool;
        #region forecast
        Forecast<string> nextWeeks = pool.StartingIn("dirty").Forecast(6);

        Console.WriteLine(nextWeeks);
        Console.WriteLine($"Clean in week 2: {nextWeeks[2]["clean"]:P1}");
        #endregion
    }

    public static void StepByStep()
    {
        var pool = InventedChains.Pool;
        #region step-by-step
        // Nothing is held: each week is computed when it is read, and the first that answers the question ends it.
        StepDistribution<string> first = pool.StartingIn("clean").StepByStep(1000).First(week => week["lost"] + week["scrapped"] >= 0.10);

        Console.WriteLine($"One crate in ten is gone after {first.Steps} weeks.");
        #endregion
    }

    public static void Seasons()
    {
        #region seasons
        // Invented figures: in summer crates stay at the shops for longer. Both chains list the same states in the same order.
        string[] states = ["clean", "at shop", "dirty"];
        Chain<string> winter = Chain.FromMatrix(states, new[,] { { 0.2, 0.8, 0.0 }, { 0.0, 0.5, 0.5 }, { 1.0, 0.0, 0.0 } });
        Chain<string> summer = Chain.FromMatrix(states, new[,] { { 0.1, 0.9, 0.0 }, { 0.0, 0.7, 0.3 }, { 1.0, 0.0, 0.0 } });
        Forecast<string> year = winter.StartingIn("clean").ForecastThrough(
            [.. Enumerable.Repeat(winter, 13), .. Enumerable.Repeat(summer, 26), .. Enumerable.Repeat(winter, 13)]);

        Console.WriteLine($"At shops in March: {year[13]["at shop"]:P1}, in September: {year[39]["at shop"]:P1}");
        #endregion
    }

    public static void Hours()
    {
        var plant = InventedChains.Plant;
        #region hours
        // The rates are per hour, so times are in hours.
        TimeDistribution<string> afterADay = plant.StartingIn("both run").AfterTime(24);
        Console.WriteLine($"None runs after 24 hours: {afterADay["none runs"]:E3}");

        foreach (TimeDistribution<string> then in plant.StartingIn("both run").AfterTimes([1, 10, 100, 1000]))
        {
            Console.WriteLine($"After {then.Time} hours: {then["none runs"]:E3}");
        }
        #endregion
    }
}
