using Stochastic.Chains.Internal;
using Stochastic.Chains.Kernels;

namespace Stochastic.Chains.Estimation;

/// <summary>
/// The maximum likelihood estimate of a transition matrix: each count divided by its row's total.
/// Source: Anderson and Goodman (1957), Ann. Math. Statist. 28, 89–110.
/// </summary>
internal static class MaximumLikelihood
{
    internal static Chain<TState> Fit<TState>(StateSpace<TState> states, CountRows rows, UnobservedStates choice)
        where TState : notnull => choice switch
        {
            UnobservedStates.Refuse => FitObserved(states, rows),
            UnobservedStates.Absorbing => FitAll(states, rows),
            UnobservedStates.Drop => FitKept(states, rows),
            _ => throw new ArgumentOutOfRangeException(nameof(choice), choice, Messages.UnknownChoice),
        };

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

    private static Chain<TState> FitObserved<TState>(StateSpace<TState> states, CountRows rows)
        where TState : notnull
    {
        var faults = new FaultCollector();
        for (var row = 0; row < rows.RowCount; row++)
        {
            if (rows.RowTotal(row) == 0)
            {
                faults.Add(ChainFaultKind.UnobservedRow, [states[row]], 0, Messages.UnobservedRow(states[row]));
            }
        }

        faults.ThrowIfAny();
        return FitAll(states, rows);
    }

    private static Chain<TState> FitKept<TState>(StateSpace<TState> states, CountRows rows)
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

        return FitAll(builder.ToStateSpace(), counter.ToRows(builder.Count));
    }

    /// <summary>Fits every row; a row without counts becomes a stay.</summary>
    private static Chain<TState> FitAll<TState>(StateSpace<TState> states, CountRows rows)
        where TState : notnull
    {
        var starts = new int[rows.RowCount + 1];
        var columns = new List<int>(rows.EntryCount);
        var values = new List<double>(rows.EntryCount);
        for (var row = 0; row < rows.RowCount; row++)
        {
            var total = rows.RowTotal(row);
            if (total == 0)
            {
                columns.Add(row);
                values.Add(1);
            }

            columns.AddRange(rows.Columns(row));
            foreach (var count in rows.Counts(row))
            {
                values.Add(ExactRatio.Of(count, total));
            }

            starts[row + 1] = columns.Count;
        }

        var matrix = TransitionMatrix.FromCompressedRows(new CompressedRows(starts, [.. columns], [.. values]));
        return new Chain<TState>(states, matrix, [], uniformizationRate: null);
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
