using System.Numerics;
using Stochastic.Chains.Kernels;

namespace Stochastic.Chains;

/// <summary>Copies off-diagonal rates of some states into the table of a direct solve.</summary>
/// <param name="matrix">Where the rates come from.</param>
/// <param name="rows">The states whose rows are copied; they are the first columns, in the same order.</param>
/// <param name="columnOf">The column of each state of the matrix; −1 leaves moves to it out, several states may share an exit column.</param>
/// <param name="columns">The number of columns: those of the rows, then exits.</param>
internal sealed class RateTable(TransitionMatrix matrix, int[] rows, int[] columnOf, int columns)
{
    private const int DoubledBytes = 32;

    /// <summary>Beyond so many runs, copying entry by entry is as fast.</summary>
    private const int LongRunsAtMost = 16;

    internal int Rows => rows.Length;

    internal int Columns => columns;

    /// <summary>The rates among some states, without exits.</summary>
    internal static RateTable Among(TransitionMatrix matrix, int[] members) => WithExits(matrix, members, 0, _ => -1);

    /// <summary>The rates of some states; a move to another state goes to exit exitOf, or is left out when that is −1.</summary>
    internal static RateTable WithExits(TransitionMatrix matrix, int[] members, int exits, Func<int, int> exitOf)
    {
        var columnOf = new int[matrix.Size];
        for (var state = 0; state < columnOf.Length; state++)
        {
            var exit = exitOf(state);
            columnOf[state] = exit < 0 ? -1 : members.Length + exit;
        }

        for (var k = 0; k < members.Length; k++)
        {
            columnOf[members[k]] = k;
        }

        return new RateTable(matrix, members, columnOf, members.Length + exits);
    }

    /// <summary>The column that moves to a state go to; −1 when they are left out.</summary>
    internal int ColumnOf(int state) => columnOf[state];

    /// <summary>Writes the rates into a table of doubles. The diagonal may be written too, for it is never read.</summary>
    internal void CopyTo(MatrixView table)
    {
        var runs = matrix.Storage == MatrixStorage.Dense ? ColumnRuns() : [];
        for (var row = 0; row < rows.Length; row++)
        {
            var target = table.Row(row, 0, columns);
            if (runs.Count is > 0 and <= LongRunsAtMost && matrix.TryGetDenseRow(rows[row], out var source))
            {
                CopyRuns(runs, source, target);
                continue;
            }

            target.Clear();
            foreach (var (to, rate) in matrix.Row(rows[row]))
            {
                if (to != rows[row] && columnOf[to] >= 0)
                {
                    target[columnOf[to]] += rate;
                }
            }
        }
    }

    /// <summary>Eliminates the first states in twice the working precision.</summary>
    /// <exception cref="MemoryLimitException">The table is too large.</exception>
    internal GeneralReduction<ScaledDoubleDouble> ReduceDoubled(int pivots, SolveOptions options)
    {
        options.RequireMemory(Rows, DoubledBytes * (long)Rows * Columns);
        var table = ToArray<ScaledDoubleDouble>(rate => rate);
        var reduction = new GeneralReduction<ScaledDoubleDouble>(table, Rows, Columns, pivots);
        if (!DoubledElimination.TryEliminate(table, Rows, Columns, reduction.Sums, options.CancellationToken))
        {
            reduction.Eliminate(options.Report("elimination"), options.CancellationToken);
        }

        return reduction;
    }

    /// <summary>Writes the rates into a new table of another arithmetic.</summary>
    internal TNumber[] ToArray<TNumber>(Func<double, TNumber> convert)
        where TNumber : struct, IAdditionOperators<TNumber, TNumber, TNumber>
    {
        var table = new TNumber[rows.Length * columns];
        for (var row = 0; row < rows.Length; row++)
        {
            foreach (var (to, rate) in matrix.Row(rows[row]))
            {
                if (to != rows[row] && columnOf[to] >= 0)
                {
                    table[(row * columns) + columnOf[to]] += convert(rate);
                }
            }
        }

        return table;
    }

    private void CopyRuns(List<(int From, int To, int Length)> runs, ReadOnlySpan<double> source, Span<double> target)
    {
        target[rows.Length..].Clear();
        foreach (var (from, to, length) in runs)
        {
            if (to < rows.Length)
            {
                source.Slice(from, length).CopyTo(target[to..]);
                continue;
            }

            for (var k = from; k < from + length; k++)
            {
                target[columnOf[k]] += source[k];
            }
        }
    }

    /// <summary>Runs of states whose columns follow each other like the states, and runs of exits.</summary>
    private List<(int From, int To, int Length)> ColumnRuns()
    {
        var runs = new List<(int From, int To, int Length)>();
        for (var state = 0; state < columnOf.Length; state++)
        {
            if (columnOf[state] < 0)
            {
                continue;
            }

            var isExit = columnOf[state] >= rows.Length;
            var continues = runs.Count > 0 && runs[^1] is var last && last.From + last.Length == state &&
                (isExit ? last.To >= rows.Length : last.To < rows.Length && last.To + last.Length == columnOf[state]);
            if (continues)
            {
                runs[^1] = (runs[^1].From, runs[^1].To, runs[^1].Length + 1);
            }
            else
            {
                runs.Add((state, columnOf[state], 1));
            }
        }

        return runs;
    }
}
