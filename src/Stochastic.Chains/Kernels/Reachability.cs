namespace Stochastic.Chains.Kernels;

/// <summary>The nodes that can be reached from a set of nodes in any number of steps, none included; O(nodes + arcs).</summary>
internal readonly struct Reachability(IEnumerable<int> sources) : IGraphAlgorithm<bool[]>
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
                if (!reached[target])
                {
                    reached[target] = true;
                    waiting.Push(target);
                }
            }
        }

        return reached;
    }
}
