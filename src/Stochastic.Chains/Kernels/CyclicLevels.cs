namespace Stochastic.Chains.Kernels;

/// <summary>
/// The period of one component and the phase of each of its nodes, by breadth-first levels: the period is the greatest common
/// divisor of level(from) + 1 − level(to) over all arcs inside (Denardo 1977, Management Science 24, 325–336).
/// </summary>
/// <param name="members">The nodes of the component; the first has phase 0.</param>
/// <param name="component">The component of every node of the graph.</param>
/// <param name="levels">Room for the level of every node of the graph; on return, those of the members modulo the period.</param>
internal readonly struct CyclicLevels(int[] members, int[] component, int[] levels) : IGraphAlgorithm<int>
{
    /// <summary>The period; 0 when no arc stays inside, so that there is no return.</summary>
    public int Run<TGraph>(TGraph graph)
        where TGraph : struct, IGraph
    {
        foreach (var member in members)
        {
            levels[member] = -1;
        }

        var period = 0;
        var queue = new Queue<int>();
        levels[members[0]] = 0;
        queue.Enqueue(members[0]);
        while (period != 1 && queue.TryDequeue(out var node))
        {
            var cursor = graph.FirstCursor(node);
            for (var target = graph.NextTarget(node, ref cursor); target >= 0 && period != 1; target = graph.NextTarget(node, ref cursor))
            {
                if (component[target] != component[node])
                {
                    continue;
                }

                if (levels[target] < 0)
                {
                    levels[target] = levels[node] + 1;
                    queue.Enqueue(target);
                }
                else
                {
                    period = (int)Divisors.Greatest(period, Math.Abs(levels[node] + 1 - levels[target]));
                }
            }
        }

        foreach (var member in members)
        {
            levels[member] = period <= 1 ? 0 : levels[member] % period;
        }

        return period;
    }
}
