using MathNet.Numerics.LinearAlgebra;
using Stochastic.Chains;

namespace Snippets;

internal static class HowLongBetweenAll
{
    public static void Table()
    {
        var pump = InventedChains.Pump;
        #region table
        FirstPassageTable<Stage> times = pump.MeanFirstPassage();

        Console.WriteLine(times);
        Console.WriteLine($"Weeks from new to failed: {times[Stage.New, Stage.Failed]:F1}");
        Console.WriteLine($"Weeks between failures: {times[Stage.Failed, Stage.Failed]:F1}");
        #endregion
    }

    public static void Kemeny()
    {
        var pump = InventedChains.Pump;
        #region kemeny
        FirstPassageTable<Stage> times = pump.MeanFirstPassage();

        Console.WriteLine($"Kemeny's constant: {times.KemenyConstant:F2} weeks");
        Console.WriteLine($"The same from every state: {times.KemenySpread < 1e-14}");
        #endregion
    }

    public static void Infinite()
    {
        var pool = InventedChains.Pool;
        #region infinite
        FirstPassageTable<string> times = pool.MeanFirstPassage();

        Console.WriteLine(times);
        #endregion
    }

    public static void Refined()
    {
        var pump = InventedChains.Pump;
        #region refined
        FirstPassageTable<Stage> times = pump.MeanFirstPassage();
        HittingTimes<Stage> column = times.Refine(Stage.Failed);

        Console.WriteLine($"The table is proved to {(times.Certificate.RelativeErrorBound <= 1e-12 ? "twelve" : "fewer")} digits");
        Console.WriteLine($"The column is proved to {(column.Certificate.RelativeErrorBound <= 5e-16 ? "almost the last digit" : "fewer digits")}");
        Console.WriteLine($"Standard deviation from new: {column.StandardDeviation(Stage.New):F2} weeks");
        #endregion
    }

    public static void Lost()
    {
        #region lost
        // Invented: two machines on two sites; parts hardly ever move between the sites.
        const double rarely = 1e-14;
        Chain<string> parts = Chain.Build<string>(rows => rows
            .Row("north shelf", ("north shelf", 0.7), ("north line", 0.3 - rarely), ("south shelf", rarely))
            .Row("north line", ("north shelf", 0.6), ("north line", 0.4))
            .Row("south shelf", ("south shelf", 0.9), ("south line", 0.1 - rarely), ("north shelf", rarely))
            .Row("south line", ("south shelf", 0.2), ("south line", 0.8)));

        FirstPassageTable<string> times = parts.MeanFirstPassage();

        // The textbook way: Z = (I - P + 1 pi)^-1 and m_ij = (z_jj - z_ij) / pi_j.
        var shares = Vector<double>.Build.DenseOfArray(parts.Stationary().ToArray());
        var system = Matrix<double>.Build.DenseIdentity(4) - parts.ToMatrix() + Matrix<double>.Build.Dense(4, 4, (_, to) => shares[to]);
        var fundamental = system.Inverse();
        var textbook = (fundamental[1, 1] - fundamental[0, 1]) / shares[1];

        Console.WriteLine($"Steps from the north shelf to the north line: {times["north shelf", "north line"]:F4}");
        Console.WriteLine($"Within twelve digits of the truth, proved: {times.Certificate is { IsProof: true, RelativeErrorBound: <= 1e-12 }}");
        var error = Math.Abs((textbook / times["north shelf", "north line"]) - 1);
        Console.WriteLine($"The textbook formula is off by more than one part in a thousand: {error > 1e-3}");
        #endregion
    }
}
