using Stochastic.Chains.Tests.Support;

namespace Stochastic.Chains.Benchmarks.Accuracy;

/// <summary>A family of invented chains, the same in every run.</summary>
/// <param name="Name">What the tables call it.</param>
/// <param name="Coupling">The size of the moves between groups; not a number where there are none.</param>
/// <param name="Create">The matrix by seed, row = from.</param>
internal sealed record AccuracyFamily(string Name, double Coupling, Func<ulong, double[,]> Create)
{
    internal const int States = 18;
    internal const string NearlyDecomposable = "nearly decomposable";
    internal const string RareEnds = "rarely ending";

    private const int Ends = 2;
    private const int WeakestCoupling = 15;

    /// <summary>Families that come back to every state.</summary>
    internal static IReadOnlyList<AccuracyFamily> Recurrent { get; } =
    [
        Hard("random dense", "random"), Hard("defective", "defective"), Hard("periodic", "periodic"), Hard("graded", "graded"),
        .. Couplings(NearlyDecomposable, (coupling, seed) => InventedMatrices.Grouped(States, coupling, seed)),
    ];

    /// <summary>Families without small probabilities and those with groups.</summary>
    internal static IReadOnlyList<AccuracyFamily> Moderate { get; } = [.. Recurrent.Where(family => family.Name != "graded")];

    /// <summary>Families that end.</summary>
    internal static IReadOnlyList<AccuracyFamily> Ending { get; } = [.. Couplings(RareEnds, RarelyEnding)];

    private static AccuracyFamily Hard(string family, string name) => new(name, double.NaN, seed => ChainFamilies.Named(family).Create(States, seed).Matrix);

    private static IEnumerable<AccuracyFamily> Couplings(string name, Func<double, ulong, double[,]> create) =>
        Enumerable.Range(2, WeakestCoupling - 1).Select(exponent =>
        {
            var coupling = RowWeights.PowerOfTen(-exponent);
            return new AccuracyFamily(name, coupling, seed => create(coupling, seed));
        });

    /// <summary>Every state moves to every other, and to each of two ends with about the probability of the coupling.</summary>
    private static double[,] RarelyEnding(double coupling, ulong seed)
    {
        var random = new SplitMix64(seed);
        var weights = new double[States, States];
        for (var from = 0; from < States; from++)
        {
            for (var to = 0; to < States; to++)
            {
                weights[from, to] = (from < Ends, to < Ends) switch
                {
                    (true, _) => from == to ? 1 : 0,
                    (false, true) => coupling * random.NextFactor(),
                    _ => random.NextFactor(),
                };
            }
        }

        return RowWeights.Normalized(weights);
    }
}
