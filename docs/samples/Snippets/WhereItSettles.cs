using Stochastic.Chains;

namespace Snippets;

internal static class WhereItSettles
{
    public static void Shares()
    {
        var pump = InventedChains.Pump;
        #region shares
        StationaryDistribution<Stage> shares = pump.Stationary();

        Console.WriteLine(shares);
        Console.WriteLine($"Weeks in which a pump stands still: {shares[Stage.Failed]:P2}");
        #endregion
    }

    public static void Cost()
    {
        var pump = InventedChains.Pump;
        #region cost
        // Cost of a week in each stage; invented figures.
        double perWeek = pump.Stationary()
            .Expectation(stage => stage switch { Stage.New => 40, Stage.Worn => 65, _ => 2100 });

        Console.WriteLine($"Cost of an average week: {perWeek:F2}");
        #endregion
    }

    public static void RareState()
    {
        var plant = InventedChains.Plant;
        #region rare-state
        StationaryDistribution<string> shares = plant.Stationary();

        Console.WriteLine($"Hours in a year without any pump: {8766 * shares["none runs"]:G4}");
        Console.WriteLine($"Proved to twelve digits: {shares.Certificate is { IsProof: true, RelativeErrorBound: <= 1e-12 }}");
        #endregion
    }

    public static void Methods()
    {
        #region methods
        // Two halves that hardly ever exchange anything; invented figures.
        Chain<string> halves = Chain.FromTransitions<string>(
        [
            new("a1", "a1", 0.7), new("a1", "a2", 0.3), new("a1", "b1", 1e-16),
            new("a2", "a1", 0.5), new("a2", "a2", 0.5),
            new("b1", "b1", 0.8), new("b1", "b2", 0.2), new("b1", "a1", 3e-16),
            new("b2", "b1", 0.7), new("b2", "b2", 0.3),
        ]);
        double exact = 1 / (1 + (0.3 / 0.5) + ((1 + (0.2 / 0.7)) / 3));   // by balancing each pair of states

        foreach (IStationaryMethod method in new IStationaryMethod[] { new EliminationMethod(), new AggregationMethod(), new LinearSystemMethod() })
        {
            StationaryDistribution<string> shares = halves.Stationary(method);
            Certificate proof = shares.Certificate;
            double error = Math.Abs((shares["a1"] / exact) - 1);
            string verdict = error < 1e-12 ? "right to twelve digits" : $"wrong by {error:P0}";
            Console.WriteLine($"{method.Name}: {verdict}");
            Console.WriteLine($"    in balance to fourteen digits: {proof.Residual < 1e-14}, proved to twelve: {proof.RelativeErrorBound < 1e-12}");
        }
        #endregion
    }

    public static void Polished()
    {
        #region polished
        // Two pumps that are almost never exchanged; invented figures.
        Chain<string> pumps = Chain.FromTransitions<string>(
        [
            new("first runs", "first runs", 0.75), new("first runs", "first rests", 0.25), new("first runs", "second runs", 1e-12),
            new("first rests", "first runs", 0.5), new("first rests", "first rests", 0.5),
            new("second runs", "second runs", 0.875), new("second runs", "second rests", 0.125), new("second runs", "first runs", 2e-12),
            new("second rests", "second runs", 1),
        ]);

        foreach (IStationaryMethod method in new IStationaryMethod[] { new LinearSystemMethod(), new PolishedMethod(new LinearSystemMethod()) })
        {
            Certificate proof = pumps.Stationary(method).Certificate;
            Console.WriteLine($"{proof.Method}: proved to six digits: {proof.RelativeErrorBound < 1e-6}, to fifteen: {proof.RelativeErrorBound < 1e-15}");
        }
        #endregion
    }

    public static void NotConverged()
    {
        var pump = InventedChains.Pump;
        #region not-converged
        try
        {
            _ = pump.Stationary(new PowerMethod { MaxIterations = 5 });
        }
        catch (ConvergenceException early)
        {
            Console.WriteLine($"{early.Iterations} steps were not enough. {early.Advice}");
        }
        #endregion
    }

    public static void SeveralEnds()
    {
        var pool = InventedChains.Pool;
        #region several-ends
        try
        {
            Console.WriteLine(pool.Stationary());
        }
        catch (ChainStructureException noSingleAnswer)
        {
            Console.WriteLine(noSingleAnswer.Message);
        }
        #endregion
    }

    public static void PerClass()
    {
        #region per-class
        // Two grades of customer that never mix once chosen; invented figures.
        Chain<string> customers = Chain.Build<string>(rows => rows
            .Row("new", ("monthly", 0.6), ("yearly", 0.4))
            .Row("monthly", ("monthly", 0.8), ("paused", 0.2))
            .Row("paused", ("monthly", 0.5), ("paused", 0.5))
            .Row("yearly", ("yearly", 1.0)));

        foreach (StationaryDistribution<string> shares in customers.StationaryPerClass())
        {
            Console.WriteLine(string.Join(", ", shares.Where(pair => pair.Value > 0).Select(pair => $"{pair.Key} {pair.Value:P1}")));
        }
        #endregion
    }
}
