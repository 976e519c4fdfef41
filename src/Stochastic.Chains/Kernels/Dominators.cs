namespace Stochastic.Chains.Kernels;

/// <summary>
/// Immediate dominators: the last node that every way from the root to a node passes before it (Cooper, Harvey and Kennedy 2001). A few
/// passes over the arcs.
/// </summary>
internal static class Dominators
{
    /// <summary>The immediate dominator of each node; the root is its own. Every node must be reachable from the root.</summary>
    /// <param name="onward">The arcs.</param>
    /// <param name="backward">The same arcs the other way round.</param>
    /// <param name="root">Where all ways start.</param>
    internal static int[] Immediate(SparseGraph onward, SparseGraph backward, int root)
    {
        var order = InPostorder(onward, root);
        var rank = new int[order.Length];
        for (var position = 0; position < order.Length; position++)
        {
            rank[order[position]] = position;
        }

        var dominators = new int[order.Length];
        Array.Fill(dominators, -1);
        dominators[root] = root;
        for (var hasChanged = true; hasChanged;)
        {
            hasChanged = false;
            for (var position = order.Length - 2; position >= 0; position--)
            {
                var node = order[position];
                var common = Common(backward, node, dominators, rank);
                hasChanged |= common != dominators[node];
                dominators[node] = common;
            }
        }

        return dominators;
    }

    private static int Common(SparseGraph backward, int node, int[] dominators, int[] rank)
    {
        var common = -1;
        var cursor = backward.FirstCursor(node);
        for (var other = backward.NextTarget(node, ref cursor); other >= 0; other = backward.NextTarget(node, ref cursor))
        {
            if (dominators[other] < 0)
            {
                continue;
            }

            var meeting = other;
            while (common >= 0 && meeting != common)
            {
                if (rank[meeting] < rank[common])
                {
                    meeting = dominators[meeting];
                }
                else
                {
                    common = dominators[common];
                }
            }

            common = meeting;
        }

        return common;
    }

    private static int[] InPostorder(SparseGraph graph, int root)
    {
        var order = new List<int>(graph.NodeCount);
        var seen = new bool[graph.NodeCount];
        var cursors = new int[graph.NodeCount];
        var path = new Stack<int>([root]);
        seen[root] = true;
        cursors[root] = graph.FirstCursor(root);
        while (path.TryPeek(out var node))
        {
            var next = graph.NextTarget(node, ref cursors[node]);
            if (next < 0)
            {
                order.Add(path.Pop());
            }
            else if (!seen[next])
            {
                seen[next] = true;
                cursors[next] = graph.FirstCursor(next);
                path.Push(next);
            }
        }

        return [.. order];
    }
}
