namespace Stochastic.Chains.Kernels;

/// <summary>The same arcs the other way round, as compressed rows; O(nodes + arcs).</summary>
internal readonly struct ReversedGraph : IGraphAlgorithm<SparseGraph>
{
    public SparseGraph Run<TGraph>(TGraph graph)
        where TGraph : struct, IGraph
    {
        var starts = new int[graph.NodeCount + 1];
        ForEachArc(graph, (_, target) => starts[target + 1]++);
        for (var node = 0; node < graph.NodeCount; node++)
        {
            starts[node + 1] += starts[node];
        }

        var next = starts.AsSpan(0, graph.NodeCount).ToArray();
        var sources = new int[starts[^1]];
        ForEachArc(graph, (source, target) => sources[next[target]++] = source);
        return new SparseGraph(starts, sources);
    }

    private static void ForEachArc<TGraph>(TGraph graph, Action<int, int> visit)
        where TGraph : struct, IGraph
    {
        for (var node = 0; node < graph.NodeCount; node++)
        {
            var cursor = graph.FirstCursor(node);
            for (var target = graph.NextTarget(node, ref cursor); target >= 0; target = graph.NextTarget(node, ref cursor))
            {
                visit(node, target);
            }
        }
    }
}
