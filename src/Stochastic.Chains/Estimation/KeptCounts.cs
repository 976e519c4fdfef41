using Stochastic.Chains.Internal;

namespace Stochastic.Chains.Estimation;

/// <summary>The counts that are left when states never left are dropped with the moves into them, again and again.</summary>
internal static class KeptCounts
{
    /// <exception cref="InvalidChainException">No state is left.</exception>
    internal static (StateSpace<TState> States, CountRows Rows) Of<TState>(StateSpace<TState> states, CountRows rows)
        where TState : notnull
    {
        var kept = FindKept(rows);
        var builder = new StateSpaceBuilder<TState>(states.Comparer);
        var positions = new int[kept.Length];
        for (var row = 0; row < kept.Length; row++)
        {
            positions[row] = kept[row] ? builder.FindOrAdd(states[row]) : -1;
        }

        if (builder.Count == 0)
        {
            var faults = new FaultCollector();
            faults.Add(ChainFaultKind.NoStates, [], 0, Messages.AllStatesDropped(states));
            throw faults.ToException();
        }

        var counter = new MoveCounter();
        for (var row = 0; row < kept.Length; row++)
        {
            var columns = rows.Columns(row);
            for (var k = 0; k < columns.Length; k++)
            {
                if (kept[row] && kept[columns[k]])
                {
                    counter.Add(positions[row], positions[columns[k]], rows.Counts(row)[k]);
                }
            }
        }

        return (builder.ToStateSpace(), counter.ToRows(builder.Count));
    }

    /// <summary>Marks the states that are left when those never left are dropped, again and again. O(states + counts).</summary>
    internal static bool[] FindKept(CountRows rows)
    {
        var sources = ListSources(rows);
        var remaining = new long[rows.RowCount];
        var kept = new bool[rows.RowCount];
        var toDrop = new Queue<int>();
        for (var row = 0; row < rows.RowCount; row++)
        {
            remaining[row] = rows.RowTotal(row);
            kept[row] = remaining[row] > 0;
            if (!kept[row])
            {
                toDrop.Enqueue(row);
            }
        }

        while (toDrop.TryDequeue(out var dropped))
        {
            foreach (var source in sources[dropped] ?? [])
            {
                remaining[source] -= rows[source, dropped];
                if (kept[source] && remaining[source] == 0)
                {
                    kept[source] = false;
                    toDrop.Enqueue(source);
                }
            }
        }

        return kept;
    }

    /// <summary>The states from which each state was entered.</summary>
    private static List<int>?[] ListSources(CountRows rows)
    {
        var sources = new List<int>?[rows.RowCount];
        for (var row = 0; row < rows.RowCount; row++)
        {
            foreach (var column in rows.Columns(row))
            {
                (sources[column] ??= []).Add(row);
            }
        }

        return sources;
    }
}
