using MathNet.Numerics.LinearAlgebra;
using Stochastic.Chains;

namespace Snippets;

internal static class MakingAChain
{
    public static void Rows()
    {
        #region rows
        // One step is a week; invented figures.
        Chain<Stage> pump = Chain.Build<Stage>(rows => rows
            .Row(Stage.New, (Stage.New, 0.90), (Stage.Worn, 0.10))
            .Row(Stage.Worn, (Stage.Worn, 0.75), (Stage.Failed, 0.25))
            .Row(Stage.Failed, (Stage.New, 1.00)));

        Console.WriteLine(pump);
        #endregion
    }

    public static void Matrix()
    {
        #region matrix
        double[,] table =
        {
            { 0.90, 0.10, 0.00 },   // from new
            { 0.00, 0.75, 0.25 },   // from worn
            { 1.00, 0.00, 0.00 },   // from failed
        };
        Chain<string> labelled = Chain.FromMatrix(["new", "worn", "failed"], table);
        Chain<int> numbered = Chain.FromMatrix(table);
        Chain<int> fromLibrary = Chain.FromMatrix(Matrix<double>.Build.DenseOfArray(table));

        Console.WriteLine(labelled["worn", "failed"]);
        Console.WriteLine(numbered[1, 2]);
        Console.WriteLine(fromLibrary.States);
        #endregion
    }

    public static void Transitions()
    {
        #region transitions
        // As they come from a file or a query, in any order.
        IEnumerable<Transition<string>> moves =
        [
            new("worn", "failed", 0.25),
            new("new", "new", 0.90),
            new("new", "worn", 0.10),
            new("failed", "new", 1.00),
            new("worn", "worn", 0.75),
        ];
        Chain<string> firstSeen = Chain.FromTransitions(moves);
        Chain<string> listed = Chain.FromTransitions(["new", "worn", "failed"], moves);

        Console.WriteLine(string.Join(", ", firstSeen.States));
        Console.WriteLine(string.Join(", ", listed.States));
        #endregion
    }

    public static void Rates()
    {
        #region rates
        // Moves per hour; invented figures.
        Chain<string> pump = Chain.FromRates([
            new TransitionRate<string>("running", "failed", 1e-4),
            new TransitionRate<string>("failed", "running", 0.05)]);

        Console.WriteLine($"Hours until it fails: {pump.TimeTo("failed").Mean("running"):F0}");
        Console.WriteLine($"Share of time it runs: {pump.Stationary()["running"]:P3}");
        #endregion
    }

    public static void Faults()
    {
        #region faults
        double[,] table = { { 0.90, 0.20, 0.00 }, { 0.00, -0.75, 0.25 }, { 0.00, 0.00, 0.00 } };
        try
        {
            _ = Chain.FromMatrix(["new", "worn", "failed"], table);
        }
        catch (InvalidChainException invalid)
        {
            Console.WriteLine(invalid.Message);
        }
        #endregion
    }

    public static void Try()
    {
        double[,] table = { { 0.90, 0.20 }, { 0.50, 0.50 } };
        #region try
        if (!Chain.TryFromMatrix(["new", "worn"], table, out Chain<string>? chain, out IReadOnlyList<ChainFault> faults))
        {
            foreach (ChainFault fault in faults)
            {
                Console.WriteLine($"{fault.Kind} at {string.Join(", ", fault.States)}: {fault.Value:G4}");
            }
        }
        #endregion
        _ = chain;
    }

    public static void Rescale()
    {
        #region rescale
        // Percentages rounded to whole numbers: the rows miss one by a little.
        double[,] rounded = { { 0.33, 0.33, 0.33 }, { 0.25, 0.50, 0.25 }, { 0.17, 0.17, 0.67 } };
        var options = new ChainOptions<string> { RowSums = RowSums.Rescale(0.015) };
        Chain<string> chain = Chain.FromMatrix(["low", "middle", "high"], rounded, options);

        foreach (RescaledRow<string> row in chain.RescaledRows)
        {
            Console.WriteLine($"{row.State} summed to {row.Sum:G4}");
        }
        #endregion
    }

    public static void Labels()
    {
        #region labels
        var options = new ChainOptions<string> { Comparer = StringComparer.OrdinalIgnoreCase };
        Chain<string> chain = Chain.Build<string>(
            rows => rows
                .Row("Clean", ("CLEAN", 0.2), ("at shop", 0.8))
                .Row("At Shop", ("clean", 1.0)),
            options);

        Console.WriteLine(string.Join(", ", chain.States));
        Console.WriteLine(chain["clean", "AT SHOP"]);
        #endregion
    }

    public static void Reading()
    {
        var pump = InventedChains.Pump;
        #region reading
        Console.WriteLine($"{pump.StateCount} states, {pump.TransitionCount} moves");
        Console.WriteLine(pump[Stage.New, Stage.Worn]);
        Console.WriteLine(pump.Row(Stage.Worn)[Stage.Failed]);
        foreach (Transition<Stage> move in pump.TransitionsFrom(Stage.Worn))
        {
            Console.WriteLine($"{move.From} to {move.To}: {move.Probability}");
        }
        #endregion
    }
}
