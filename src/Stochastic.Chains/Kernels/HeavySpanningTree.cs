namespace Stochastic.Chains.Kernels;

/// <summary>
/// A spanning tree of the undirected graph of the moves between some states whose flows are heavy: each move counts as an edge with the
/// flow as its weight, and the tree is of largest weight but for ties (Borůvka 1926). O(m log n) time, O(n) memory.
/// </summary>
/// <param name="Order">The states, the root first and each other one after its parent.</param>
/// <param name="Parents">The parent of each state; the root has none.</param>
/// <param name="Flows">The flow along the edge of each state to its parent, rounded to nearest.</param>
internal sealed record HeavySpanningTree(int[] Order, int[] Parents, double[] Flows)
{
    /// <summary>The smallest flow along an edge; +∞ for a single state.</summary>
    internal double SmallestFlow()
    {
        var smallest = double.PositiveInfinity;
        foreach (var state in Order.AsSpan(1))
        {
            smallest = Math.Min(smallest, Flows[state]);
        }

        return smallest;
    }

    /// <summary>The tree of the flows weight · rate of normal size, or null when these do not connect the states.</summary>
    internal static HeavySpanningTree? Find<TRows>(TRows rows, ReadOnlySpan<int> states, double[] weights, CancellationToken cancellation)
        where TRows : struct, IRateRows
    {
        var growth = new TreeGrowth(rows.Count);
        for (var edges = 0; edges < states.Length - 1; edges = growth.EdgeCount)
        {
            cancellation.ThrowIfCancellationRequested();
            growth.Scan(rows, states, weights);
            growth.Join(states);
            if (growth.EdgeCount == edges)
            {
                return null;
            }
        }

        return growth.RootedAt(states[0], states.Length);
    }
}
