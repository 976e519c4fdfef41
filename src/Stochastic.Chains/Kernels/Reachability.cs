namespace Stochastic.Chains.Kernels;

/// <summary>The nodes that can be reached from a set of nodes in any number of steps, none included; O(nodes + arcs).</summary>
/// <param name="sources">Where the search starts.</param>
/// <param name="blocked">Nodes that the search does not enter unless it starts there; null for none.</param>
internal readonly struct Reachability(IEnumerable<int> sources, bool[]? blocked = null) : IGraphAlgorithm<bool[]>
{
    public bool[] Run<TGraph>(TGraph graph)
        where TGraph : struct, IGraph
    {
        var reached = new bool[graph.NodeCount];
        var waiting = new Stack<int>();
        foreach (var source in sources)
        {
            reached[source] = true;
            waiting.Push(source);
        }

        while (waiting.TryPop(out var node))
        {
            var cursor = graph.FirstCursor(node);
            for (var target = graph.NextTarget(node, ref cursor); target >= 0; target = graph.NextTarget(node, ref cursor))
            {
                if (!reached[target] && blocked?[target] != true)
                {
                    reached[target] = true;
                    waiting.Push(target);
                }
            }
        }

        return reached;
    }
}
