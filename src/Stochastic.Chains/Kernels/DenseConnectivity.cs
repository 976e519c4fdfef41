namespace Stochastic.Chains.Kernels;

/// <summary>
/// Whether a dense graph is strongly connected, found without walking every arc: each search stops when all nodes are reached,
/// after one row and one column where the table has no zeros.
/// </summary>
internal static class DenseConnectivity
{
    internal static bool IsStronglyConnected(ReadOnlySpan<double> table, int size) =>
        ReachesAll(table, size, nodeStride: size, targetStride: 1) && ReachesAll(table, size, nodeStride: 1, targetStride: size);

    private static bool ReachesAll(ReadOnlySpan<double> table, int size, int nodeStride, int targetStride)
    {
        var missing = new int[size - 1];
        for (var k = 0; k < missing.Length; k++)
        {
            missing[k] = k + 1;
        }

        var missingCount = missing.Length;
        var waiting = new Stack<int>();
        waiting.Push(0);
        while (missingCount > 0 && waiting.TryPop(out var node))
        {
            var kept = 0;
            for (var k = 0; k < missingCount; k++)
            {
                var target = missing[k];
                if (table[(node * nodeStride) + (target * targetStride)] != 0)
                {
                    waiting.Push(target);
                }
                else
                {
                    missing[kept++] = target;
                }
            }

            missingCount = kept;
        }

        return missingCount == 0;
    }
}
