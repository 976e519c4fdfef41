namespace Stochastic.Chains.Kernels;

/// <summary>A directed graph on nodes 0 to NodeCount − 1 whose arcs can be walked one by one.</summary>
internal interface IGraph
{
    int NodeCount { get; }

    /// <summary>The cursor from which the arcs of a node are walked.</summary>
    int FirstCursor(int node);

    /// <summary>The target of the node's next arc at or after the cursor, which moves past it; −1 when there is none.</summary>
    int NextTarget(int node, ref int cursor);
}

/// <summary>An algorithm that runs on any graph without knowing its storage.</summary>
internal interface IGraphAlgorithm<TResult>
{
    TResult Run<TGraph>(TGraph graph)
        where TGraph : struct, IGraph;
}

/// <summary>The arcs are the nonzero entries of a row-major square table.</summary>
internal readonly struct DenseGraph(double[] table, int size) : IGraph
{
    public int NodeCount => size;

    public int FirstCursor(int node) => 0;

    public int NextTarget(int node, ref int cursor)
    {
        var found = table.AsSpan((node * size) + cursor, size - cursor).IndexOfAnyExcept(0.0);
        if (found < 0)
        {
            cursor = size;
            return -1;
        }

        cursor += found + 1;
        return cursor - 1;
    }
}

/// <summary>The arcs are the columns of compressed sparse rows.</summary>
internal readonly struct SparseGraph(int[] starts, int[] columns) : IGraph
{
    public int NodeCount => starts.Length - 1;

    public int FirstCursor(int node) => starts[node];

    public int NextTarget(int node, ref int cursor) => cursor < starts[node + 1] ? columns[cursor++] : -1;
}
