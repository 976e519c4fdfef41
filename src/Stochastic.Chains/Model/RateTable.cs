using Stochastic.Chains.Kernels;

namespace Stochastic.Chains;

/// <summary>Copies off-diagonal rates of some states into the dense table of a direct solve, refusing what would not fit.</summary>
internal static class RateTable
{
    private const int BytesPerEntry = 16;

    /// <summary>The rates among some states.</summary>
    internal static ScaledDouble[] Square(TransitionMatrix matrix, ReadOnlySpan<int> members, SolveOptions options)
    {
        var columnOf = new int[matrix.Size];
        columnOf.AsSpan().Fill(-1);
        for (var k = 0; k < members.Length; k++)
        {
            columnOf[members[k]] = k;
        }

        return Bordered(matrix, members, columnOf, members.Length, options);
    }

    /// <summary>The rates of some states into numbered columns; −1 leaves a target out, several targets may share a column.</summary>
    internal static ScaledDouble[] Bordered(TransitionMatrix matrix, ReadOnlySpan<int> rows, int[] columnOf, int columns, SolveOptions options)
    {
        var entries = (long)rows.Length * columns;
        options.RequireMemory(rows.Length, entries * BytesPerEntry);
        var table = new ScaledDouble[entries];
        matrix.AddRates(rows, columnOf, (row, column, rate) => table[(row * columns) + column] += rate);
        return table;
    }
}
