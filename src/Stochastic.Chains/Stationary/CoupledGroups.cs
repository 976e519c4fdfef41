using Stochastic.Chains.Kernels;

namespace Stochastic.Chains.Stationary;

/// <summary>Groups of states that strong moves tie together, by union-find in nearly O(transitions).</summary>
internal static class CoupledGroups
{
    /// <summary>Ties two states together when a move between them carries at least the threshold's part of the outflow of its start.</summary>
    internal static Components Find(StationaryProblem problem, double threshold)
    {
        var parent = Enumerable.Range(0, problem.StateCount).ToArray();
        for (var to = 0; to < parent.Length; to++)
        {
            var sources = problem.Inflows.RowColumns(to);
            var rates = problem.Inflows.RowValues(to);
            for (var k = 0; k < sources.Length; k++)
            {
                if (rates[k] >= threshold * problem.Outflows[sources[k]])
                {
                    parent[Root(parent, sources[k])] = Root(parent, to);
                }
            }
        }

        var numbers = new Dictionary<int, int>();
        var groupOf = new int[parent.Length];
        for (var state = 0; state < groupOf.Length; state++)
        {
            var root = Root(parent, state);
            numbers.TryAdd(root, numbers.Count);
            groupOf[state] = numbers[root];
        }

        return new Components(groupOf, numbers.Count);
    }

    private static int Root(int[] parent, int state)
    {
        while (parent[state] != state)
        {
            parent[state] = parent[parent[state]];
            state = parent[state];
        }

        return state;
    }
}
