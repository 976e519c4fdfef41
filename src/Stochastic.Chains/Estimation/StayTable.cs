using Stochastic.Chains.Internal;

namespace Stochastic.Chains.Estimation;

/// <summary>Staying and leaving by the steps already spent in a state, long stays taken together until enough of both are expected.</summary>
internal static class StayTable
{
    private const double FewestExpected = 5; // common practice, no source

    internal static ContingencyTable Of(string state, StayCounts counts)
    {
        var stays = counts.Stays;
        var leaves = counts.Leaves;
        var (allStays, allLeaves) = (Sum(stays), Sum(leaves));
        var (labels, rows) = (new List<string>(), new List<(long Stays, long Leaves)>());
        var (first, staysHere, leavesHere) = (1, 0L, 0L);
        for (var age = 1; age <= stays.Length; age++)
        {
            staysHere += stays[age - 1];
            leavesHere += leaves[age - 1];
            if (IsEnough(staysHere + leavesHere, allStays, allLeaves))
            {
                labels.Add(Messages.StayRow(first, age));
                rows.Add((staysHere, leavesHere));
                (first, staysHere, leavesHere) = (age + 1, 0, 0);
            }
        }

        if (staysHere + leavesHere > 0)
        {
            AddRest(labels, rows, first, staysHere, leavesHere);
        }

        var table = new long[rows.Count, 2];
        for (var row = 0; row < rows.Count; row++)
        {
            (table[row, 0], table[row, 1]) = rows[row];
        }

        return new ContingencyTable(state, labels, [Messages.Stays, Messages.Leaves], table);
    }

    private static void AddRest(List<string> labels, List<(long Stays, long Leaves)> rows, int first, long stays, long leaves)
    {
        if (rows.Count == 0)
        {
            labels.Add(Messages.StayRowFrom(first));
            rows.Add((stays, leaves));
            return;
        }

        rows[^1] = (rows[^1].Stays + stays, rows[^1].Leaves + leaves);
        labels[^1] += Messages.OrMore;
    }

    private static bool IsEnough(long here, long stays, long leaves)
    {
        var all = (double)stays + leaves;
        return here * (Math.Min(stays, leaves) / all) >= FewestExpected;
    }

    private static long Sum(ReadOnlySpan<long> counts)
    {
        var sum = 0L;
        foreach (var count in counts)
        {
            sum += count;
        }

        return sum;
    }
}
