namespace Stochastic.Chains.Kernels;

/// <summary>Borůvka's trees that grow together: every round joins each with the tree at the other end of its heaviest edge.</summary>
internal sealed class TreeGrowth
{
    private const double LargestSubnormal = 2.2250738585072009e-308;

    private readonly Node[] _nodes;
    private readonly int[] _champions;
    private readonly List<(int First, int Second, double Flow)> _edges = [];

    internal TreeGrowth(int count)
    {
        _nodes = new Node[count];
        _champions = new int[count];
        for (var state = 0; state < count; state++)
        {
            _nodes[state].Tree = state;
        }
    }

    internal int EdgeCount => _edges.Count;

    /// <summary>Finds for each state its heaviest move from or to another tree.</summary>
    internal void Scan<TRows>(TRows rows, ReadOnlySpan<int> states, double[] weights)
        where TRows : struct, IRateRows
    {
        var nodes = _nodes;
        foreach (ref var node in nodes.AsSpan())
        {
            node.Flow = LargestSubnormal;
        }

        foreach (var from in states)
        {
            var rates = rows.Rates(from);
            var weight = weights[from];
            ref var node = ref nodes[from];
            for (var position = 0; position < rates.Length; position++)
            {
                var to = rows.Column(from, position);
                ref var other = ref nodes[to];
                if (other.Tree != node.Tree)
                {
                    var flow = weight * rates[position];
                    node.Offer(to, flow);
                    other.Offer(from, flow);
                }
            }
        }
    }

    /// <summary>Joins each tree with another along its heaviest edge.</summary>
    internal void Join(ReadOnlySpan<int> states)
    {
        Array.Fill(_champions, -1);
        foreach (var state in states)
        {
            ref var champion = ref _champions[_nodes[state].Tree];
            if (_nodes[state].Flow > LargestSubnormal && (champion < 0 || _nodes[state].Flow > _nodes[champion].Flow))
            {
                champion = state;
            }
        }

        foreach (var state in states)
        {
            var champion = _champions[state];
            if (champion >= 0)
            {
                Join(champion, _nodes[champion].End, _nodes[champion].Flow);
            }
        }

        foreach (var state in states)
        {
            _nodes[state].Tree = TreeOf(state);
        }
    }

    /// <summary>The one tree that is left, hung up at a root.</summary>
    internal HeavySpanningTree RootedAt(int root, int count)
    {
        var starts = new int[_nodes.Length + 1];
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
        var parents = new int[_nodes.Length];
        var flows = new double[_nodes.Length];
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

    /// <summary>Trees are kept apart by their numbers, not by the weights of their edges, so ties make no cycle.</summary>
    private void Join(int first, int second, double flow)
    {
        var (firstTree, secondTree) = (TreeOf(first), TreeOf(second));
        if (firstTree != secondTree)
        {
            _nodes[Math.Max(firstTree, secondTree)].Tree = Math.Min(firstTree, secondTree);
            _edges.Add((first, second, flow));
        }
    }

    private int TreeOf(int state)
    {
        while (_nodes[state].Tree != state)
        {
            state = _nodes[state].Tree = _nodes[_nodes[state].Tree].Tree;
        }

        return state;
    }

    /// <summary>What is known of a state: its tree, and its heaviest move from or to another tree with the state at the other end.</summary>
    private struct Node
    {
        internal double Flow;
        internal int Tree;
        internal int End;

        internal void Offer(int end, double flow)
        {
            if (flow > Flow)
            {
                (Flow, End) = (flow, end);
            }
        }
    }
}
