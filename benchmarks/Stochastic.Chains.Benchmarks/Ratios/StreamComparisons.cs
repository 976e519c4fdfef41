namespace Stochastic.Chains.Benchmarks.Ratios;

/// <summary>Counting what was observed.</summary>
internal static class StreamComparisons
{
    private const int States = 1000;

    internal static IReadOnlyList<Comparison> All { get; } = [Counting(1_000_000)];

    private static Comparison Counting(int events) => new("Counting a path", FormattableString.Invariant($"{events:N0} events, {States:N0} states"), () =>
    {
        var path = InventedChains.Path(events, States);
        return new Contest(
            () => TransitionCounts.FromPath(path)[path[0], path[1]],
            null,
            [
                Rival.InPython("numpy.bincount", "pair_counts", [path]),
                Rival.Here("array of counts, by hand", () => InventedChains.CountByHand(path, States)[path[0], path[1]]),
            ]);
    });
}
