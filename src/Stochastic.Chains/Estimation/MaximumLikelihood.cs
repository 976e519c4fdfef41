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
        var (left, moves) = KeptCounts.Of(states, rows);
        return FitAll(left, moves);
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
}
