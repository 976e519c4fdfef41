namespace Stochastic.Chains.Kernels;

/// <summary>A partition of the nodes of a graph into its strongly connected components.</summary>
/// <param name="ComponentOf">The component of each node; arcs between components lead from higher numbers to lower ones.</param>
/// <param name="Count">The number of components.</param>
internal sealed record Components(int[] ComponentOf, int Count)
{
    /// <summary>The nodes of each component, ascending.</summary>
    internal int[][] Members()
    {
        var sizes = new int[Count];
        foreach (var component in ComponentOf)
        {
            sizes[component]++;
        }

        var members = Array.ConvertAll(sizes, size => new int[size]);
        var next = new int[Count];
        for (var node = 0; node < ComponentOf.Length; node++)
        {
            var component = ComponentOf[node];
            members[component][next[component]++] = node;
        }

        return members;
    }
}
