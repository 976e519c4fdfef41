namespace Stochastic.Chains.Tests.Support;

/// <summary>Simple walks on small graphs.</summary>
internal static class GraphRules
{
    public static PublishedChain Path(int vertices) => Walk(vertices, i => [.. new[] { i - 1, i + 1 }.Where(j => j >= 0 && j < vertices)]);

    public static PublishedChain Cycle(int vertices) => Walk(vertices, i => [(i + vertices - 1) % vertices, (i + 1) % vertices]);

    public static PublishedChain Complete(int vertices) => Walk(vertices, i => [.. Enumerable.Range(0, vertices).Where(j => j != i)]);

    /// <summary>The centre is vertex 0.</summary>
    public static PublishedChain Star(int leaves) => Walk(leaves + 1, i => i == 0 ? [.. Enumerable.Range(1, leaves)] : [0]);

    /// <summary>(I + P)/2.</summary>
    public static PublishedChain Lazy(PublishedChain chain) => PublishedChain.FromOffDiagonals(
        chain.StateCount,
        chain.OffDiagonals.Select(move => (move.From, move.To, move.Probability / 2)));

    /// <summary>A directed cycle in which one state jumps to state 0 with the given chance.</summary>
    public static PublishedChain CycleWithShortcut(int states, int from, Rational chance) => PublishedChain.FromEntries(
        states,
        Enumerable.Range(0, states)
            .Select(i => (i, (i + 1) % states, i == from ? 1 - chance : Rational.One))
            .Append((from, 0, chance)));

    private static PublishedChain Walk(int vertices, Func<int, int[]> neighbours) =>
        PublishedChain.FromNeighbours([.. Enumerable.Range(0, vertices).Select(neighbours)]);
}
