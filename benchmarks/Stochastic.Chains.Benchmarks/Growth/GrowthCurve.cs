namespace Stochastic.Chains.Benchmarks.Growth;

/// <summary>A question asked at growing sizes.</summary>
/// <param name="Question">What is asked.</param>
/// <param name="Measure">What grows.</param>
/// <param name="Order">The order of the time in theory, as an exponent of the measure.</param>
/// <param name="MemoryOrder">The order of the memory in theory.</param>
/// <param name="Sizes">The sizes, ascending.</param>
/// <param name="Prepare">Makes the input of a size and returns the call.</param>
internal sealed record GrowthCurve(
    string Question, string Measure, double Order, double MemoryOrder, IReadOnlyList<int> Sizes, Func<int, Action> Prepare)
{
    private const string States = "states";
    private const string Transitions = "transitions";
    private const int MovesPerState = 10;

    private static readonly int[] Dense = [64, 128, 256, 512, 1024, 2048];
    private static readonly int[] Sparse = [20_000, 100_000, 500_000, 2_000_000];

    internal static IReadOnlyList<GrowthCurve> All { get; } =
    [
        OfTable("Making a chain from a matrix", 2, matrix => () => Chain.FromMatrix(matrix)),
        OfChain("Long-run shares", 3, chain => () => chain.Stationary(Ratios.Comparisons.WithoutEvidence)),
        OfChain("Long-run shares, proved", 3, chain => () => chain.Stationary()),
        OfChain("Mean times to one state", 3, chain => () => chain.TimeTo(0, Ratios.Comparisons.WithoutEvidence)),
        OfChain("Mean first passage times, all pairs", 3, chain => () => chain.MeanFirstPassage(Ratios.Comparisons.WithoutEvidence)),
        OfChain("Matrix of 1000 steps", 3, chain => () => chain.NStep(1000, new SquaringMethod(), Ratios.Comparisons.WithoutEvidence)),
        OfMoves("Making a chain from moves", InventedChains.AllNear, moves => () => Chain.FromTransitions(moves)),
        OfMoves("Distribution after 10 steps", InventedChains.AllNear, moves =>
        {
            var chain = Chain.FromTransitions(moves);
            var start = chain.StartingIn(Distribution.Uniform(chain.States));
            return () => start.After(10, Ratios.Comparisons.WithoutEvidence);
        }),
        OfMoves("Classes and periods", InventedChains.AllNear, moves =>
        {
            var chain = Chain.FromTransitions(moves);
            return () => new Chain<int>(chain.States, chain.Matrix, [], null).Structure();
        }),
        OfMoves("Long-run shares by aggregation", InventedChains.HalfNear, moves =>
        {
            var chain = Chain.FromTransitions(moves);
            chain.Structure();
            return () => chain.Stationary(new AggregationMethod(), Ratios.Comparisons.WithoutEvidence);
        }),
    ];

    private static GrowthCurve OfTable(string question, double order, Func<double[,], Action> prepare) =>
        new(question, States, order, 2, Dense, size => prepare(InventedMatrices.Dense(size)));

    private static GrowthCurve OfChain(string question, double order, Func<Chain<int>, Action> prepare) =>
        new(question, States, order, 2, Dense, size => prepare(Chain.FromMatrix(InventedMatrices.Dense(size))));

    private static GrowthCurve OfMoves(string question, Func<int, Transition<int>[]> make, Func<Transition<int>[], Action> prepare) =>
        new(question, Transitions, 1, 1, Sparse, size => prepare(make(size / MovesPerState)));
}
