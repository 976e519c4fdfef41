namespace Stochastic.Chains.Kernels;

/// <summary>
/// The strongly connected components of a graph in O(nodes + arcs), without recursion (Tarjan 1972, SIAM J. Comput. 1, 146–160).
/// Components are numbered so that every arc between two of them leads from the higher number to the lower.
/// </summary>
internal readonly struct StronglyConnectedComponents : IGraphAlgorithm<Components>
{
    private const int Unseen = -1;

    public Components Run<TGraph>(TGraph graph)
        where TGraph : struct, IGraph
    {
        var count = graph.NodeCount;
        var component = new int[count];
        component.AsSpan().Fill(Unseen);
        var order = new int[count];
        order.AsSpan().Fill(Unseen);
        var lowest = new int[count];
        var cursors = new int[count];
        var open = new Stack<int>();
        var path = new Stack<int>();
        var seen = 0;
        var components = 0;
        for (var root = 0; root < count; root++)
        {
            if (order[root] == Unseen)
            {
                Enter(root);
            }

            while (path.TryPeek(out var node))
            {
                var target = graph.NextTarget(node, ref cursors[node]);
                if (target < 0)
                {
                    Leave(node);
                }
                else if (order[target] == Unseen)
                {
                    Enter(target);
                }
                else if (component[target] == Unseen)
                {
                    lowest[node] = Math.Min(lowest[node], order[target]);
                }
            }
        }

        return new Components(component, components);

        void Enter(int node)
        {
            order[node] = lowest[node] = seen++;
            cursors[node] = graph.FirstCursor(node);
            open.Push(node);
            path.Push(node);
        }

        void Leave(int node)
        {
            path.Pop();
            if (path.TryPeek(out var parent))
            {
                lowest[parent] = Math.Min(lowest[parent], lowest[node]);
            }

            if (lowest[node] != order[node])
            {
                return;
            }

            int member;
            do
            {
                member = open.Pop();
                component[member] = components;
            }
            while (member != node);
            components++;
        }
    }
}
