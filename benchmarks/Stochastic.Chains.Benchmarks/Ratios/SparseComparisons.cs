using MathNet.Numerics.LinearAlgebra;

namespace Stochastic.Chains.Benchmarks.Ratios;

/// <summary>Questions of large chains with few moves out of each state.</summary>
internal static class SparseComparisons
{
    private const int Million = 1_000_000;
    private const int Steps = 10;

    internal static IReadOnlyList<Comparison> All { get; } =
    [
        Construction(100_000),
        Structure(Million / 10),
        Forecast("half of them near", () => InventedChains.HalfNear(Million)),
        Forecast("all near", () => InventedChains.AllNear(Million)),
        Settling("nearly decomposable, 100,000 states in 200 groups", target: 0.02, () => InventedChains.Groups(groups: 200, members: 500, coupling: 1e-4)),
        Settling("two queues in line, 300 by 300", target: 0.6, () => InventedChains.TwoQueues(300)),
    ];

    private static Comparison Construction(int states) => new("Making a chain", FormattableString.Invariant($"{states:N0} states, ten moves each"), () =>
    {
        var moves = InventedMatrices.TenEach(states);
        var triplets = new Triplets(moves);
        return new Contest(
            () => Chain.FromTransitions(moves)[moves[0].From, moves[0].To],
            null,
            [
                Rival.InPython("scipy.sparse.csr_matrix", "compressed_rows", triplets.Arrays),
                Rival.Here("MathNet.Numerics sparse matrix", () => Matrix<double>.Build
                    .SparseOfIndexed(states, states, moves.Select(move => (move.From, move.To, move.Probability)))[moves[0].From, moves[0].To]),
            ]);
    });

    /// <summary>The structure is kept with a chain, so each run asks a chain that has not been asked; making it is not timed with it.</summary>
    private static Comparison Structure(int states) => new("Classes and periods", FormattableString.Invariant($"{states:N0} states, ten moves each"), () =>
    {
        var moves = InventedChains.HalfNear(states);
        var chain = Chain.FromTransitions(moves);
        return new Contest(
            () => new Chain<int>(chain.States, chain.Matrix, [], null).Structure().Classes.Count,
            null,
            [Rival.InPython("scipy connected_components", "strong_components", new Triplets(moves).Arrays)]);
    });

    private static Comparison Forecast(string kind, Func<Transition<int>[]> make) => new($"Distribution after {Steps} steps", $"1,000,000 states, ten moves each, {kind}", () =>
    {
        var moves = make();
        var chain = Chain.FromTransitions(moves);
        var start = chain.StartingIn(Distribution.Uniform(chain.States));
        return new Contest(
            () => start.After(Steps, Comparisons.WithoutEvidence).Values[0],
            () => start.After(Steps).Values[0],
            [Rival.InPython("scipy.sparse product", "steps", [.. new Triplets(moves).Arrays, new[] { Steps }], target: 0.75)]);
    });

    private static Comparison Settling(string kind, double target, Func<Transition<int>[]> make) => new("Long-run shares", kind, () =>
    {
        var moves = make();
        var chain = Chain.FromTransitions(moves);
        return new Contest(
            () => chain.Stationary(Comparisons.WithoutEvidence).Values[0],
            () => chain.Stationary().Values[0],
            [Rival.InPython("scipy.sparse.linalg.splu", "sparse_stationary", new Triplets(moves).Arrays, target)]);
    });
}
