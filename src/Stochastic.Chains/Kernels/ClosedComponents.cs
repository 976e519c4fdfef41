namespace Stochastic.Chains.Kernels;

/// <summary>Which components no arc leaves, in O(nodes + arcs).</summary>
internal readonly struct ClosedComponents(Components components) : IGraphAlgorithm<bool[]>
{
    public bool[] Run<TGraph>(TGraph graph)
        where TGraph : struct, IGraph
    {
        var component = components.ComponentOf;
        var closed = new bool[components.Count];
        closed.AsSpan().Fill(true);
        for (var node = 0; node < graph.NodeCount; node++)
        {
            if (!closed[component[node]])
            {
                continue;
            }

            var cursor = graph.FirstCursor(node);
            for (var target = graph.NextTarget(node, ref cursor); target >= 0; target = graph.NextTarget(node, ref cursor))
            {
                if (component[target] != component[node])
                {
                    closed[component[node]] = false;
                    break;
                }
            }
        }

        return closed;
    }
}
