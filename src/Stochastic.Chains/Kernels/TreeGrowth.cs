namespace Stochastic.Chains.Kernels;

/// <summary>Borůvka's trees that grow together: every round joins each with the tree at the other end of its heaviest edge.</summary>
internal sealed class TreeGrowth
{
    private const double LargestSubnormal = 2.2250738585072009e-308;

    private readonly int[] _trees;
    private readonly double[] _heaviest;
    private readonly int[] _ends;
    private readonly int[] _champions;
    private readonly List<(int First, int Second, double Flow)> _edges = [];

    internal TreeGrowth(int count)
    {
        _trees = new int[count];
        _heaviest = new double[count];
        _ends = new int[count];
        _champions = new int[count];
        for (var state = 0; state < count; state++)
        {
            _trees[state] = state;
        }
    }

    internal int EdgeCount => _edges.Count;

    /// <summary>Finds for each state its heaviest move from or to another tree.</summary>
    internal void Scan<TRows>(TRows rows, ReadOnlySpan<int> states, double[] weights)
        where TRows : struct, IRateRows
    {
        var trees = _trees;
        var heaviest = _heaviest;
        Array.Fill(heaviest, LargestSubnormal);
        foreach (var from in states)
        {
            var rates = rows.Rates(from);
            var weight = weights[from];
            var tree = trees[from];
            for (var position = 0; position < rates.Length; position++)
            {
                var to = rows.Column(from, position);
                var flow = weight * rates[position];
                if (trees[to] == tree || !(flow > Math.Min(heaviest[from], heaviest[to])))
                {
                    continue;
                }

                Offer(from, to, flow);
                Offer(to, from, flow);
            }
        }
    }

    /// <summary>Joins each tree with another along its heaviest edge.</summary>
    internal void Join(ReadOnlySpan<int> states)
    {
        Array.Fill(_champions, -1);
        foreach (var state in states)
        {
            ref var champion = ref _champions[_trees[state]];
            if (_heaviest[state] > LargestSubnormal && (champion < 0 || _heaviest[state] > _heaviest[champion]))
            {
                champion = state;
            }
        }

        foreach (var state in states)
        {
            var champion = _champions[state];
            if (champion >= 0)
            {
                Join(champion, _ends[champion], _heaviest[champion]);
            }
        }

        foreach (var state in states)
        {
            _trees[state] = TreeOf(state);
        }
    }

    /// <summary>The one tree that is left, hung up at a root.</summary>
    internal HeavySpanningTree RootedAt(int root, int count)
    {
        var starts = new int[_trees.Length + 1];
        foreach (var (first, second, _) in _edges)
        {
            starts[first]++;
            starts[second]++;
        }

        for (var state = 1; state < starts.Length; state++)
        {
            starts[state] += starts[state - 1];
        }

        var edgesOf = new int[2 * _edges.Count];
        for (var edge = 0; edge < _edges.Count; edge++)
        {
            edgesOf[--starts[_edges[edge].First]] = edge;
            edgesOf[--starts[_edges[edge].Second]] = edge;
        }

        var order = new int[count];
        var parents = new int[_trees.Length];
        var flows = new double[_trees.Length];
        order[0] = root;
        parents[root] = -1;
        var found = 1;
        for (var k = 0; k < count; k++)
        {
            var state = order[k];
            foreach (var edge in edgesOf.AsSpan(starts[state], starts[state + 1] - starts[state]))
            {
                var (first, second, flow) = _edges[edge];
                var child = first == state ? second : first;
                if (child != parents[state])
                {
                    parents[child] = state;
                    flows[child] = flow;
                    order[found++] = child;
                }
            }
        }

        return new HeavySpanningTree(order, parents, flows);
    }

    private void Offer(int state, int end, double flow)
    {
        if (flow > _heaviest[state])
        {
            _heaviest[state] = flow;
            _ends[state] = end;
        }
    }

    /// <summary>Trees are kept apart by their numbers, not by the weights of their edges, so ties make no cycle.</summary>
    private void Join(int first, int second, double flow)
    {
        var (firstTree, secondTree) = (TreeOf(first), TreeOf(second));
        if (firstTree != secondTree)
        {
            _trees[Math.Max(firstTree, secondTree)] = Math.Min(firstTree, secondTree);
            _edges.Add((first, second, flow));
        }
    }

    private int TreeOf(int state)
    {
        while (_trees[state] != state)
        {
            state = _trees[state] = _trees[_trees[state]];
        }

        return state;
    }
}
