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

    /// <summary>Writes the rates into a table of doubles.</summary>
    internal void CopyTo(MatrixView table)
    {
        var isWhole = rows.Length == matrix.Size && rows.AsSpan().SequenceEqual(Enumerable.Range(0, matrix.Size).ToArray());
        for (var row = 0; row < rows.Length; row++)
        {
            var target = table.Row(row, 0, columns);
            if (isWhole && matrix.TryCopyDenseRow(row, target))
            {
                continue; // all states in their own order, and the diagonal is never read
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
}
