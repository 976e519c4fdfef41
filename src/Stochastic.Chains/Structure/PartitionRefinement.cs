using Stochastic.Chains.Kernels;

namespace Stochastic.Chains.Structure;

/// <summary>The coarsest partition, finer than a given one, whose blocks are moved into with equal probabilities from all states of a block.</summary>
internal sealed class PartitionRefinement(TransitionMatrix matrix, double tolerance)
{
    internal int[] Refine(int[] blockOf)
    {
        int[] blocks = [.. blockOf];
        var count = blocks.Max() + 1;
        var waiting = new Queue<int>(Enumerable.Range(0, count));
        while (waiting.TryDequeue(out var splitter))
        {
            var into = ProbabilitiesInto(blocks, splitter);
            foreach (var members in Enumerable.Range(0, blocks.Length).GroupBy(state => blocks[state]).Select(group => group.ToArray()).ToArray())
            {
                Array.Sort(members, (one, other) => into[one].CompareTo(into[other]));
                var own = blocks[members[0]];
                var isSplit = false;
                for (var k = 1; k < members.Length; k++)
                {
                    if (into[members[k]] - into[members[k - 1]] > tolerance * into[members[k]])
                    {
                        own = count++;
                        isSplit = true;
                        waiting.Enqueue(own);
                    }

                    if (isSplit)
                    {
                        blocks[members[k]] = own;
                    }
                }

                if (isSplit)
                {
                    waiting.Enqueue(blocks[members[0]]);
                }
            }
        }

        return blocks;
    }

    private double[] ProbabilitiesInto(int[] blocks, int block)
    {
        var into = new double[blocks.Length];
        for (var state = 0; state < into.Length; state++)
        {
            var sum = default(CompensatedSum);
            foreach (var (to, probability) in matrix.Row(state))
            {
                sum.Add(blocks[to] == block ? probability : 0);
            }

            into[state] = sum.Value;
        }

        return into;
    }
}
