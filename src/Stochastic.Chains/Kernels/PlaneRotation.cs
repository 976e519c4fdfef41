namespace Stochastic.Chains.Kernels;

/// <summary>Turns two neighboring rows or columns of a row-major table by one angle (Givens 1958). O(length).</summary>
internal static class PlaneRotation
{
    /// <summary>Two rows, (upper, lower) to (cosine · upper + sine · lower, cosine · lower − sine · upper), from one column on.</summary>
    internal static void OfRows(Span<double> rows, int fromColumn, double cosine, double sine)
    {
        var upper = rows[fromColumn..(rows.Length / 2)];
        var lower = rows[(rows.Length / 2)..].Slice(fromColumn, upper.Length);
        for (var column = 0; column < upper.Length; column++)
        {
            (upper[column], lower[column]) = Turn(upper[column], lower[column], cosine, sine);
        }
    }

    /// <summary>The column and the one right of it, in all rows of the table.</summary>
    internal static void OfColumns(Span<double> table, int stride, int column, double cosine, double sine)
    {
        for (var index = column; index < table.Length; index += stride)
        {
            (table[index], table[index + 1]) = Turn(table[index], table[index + 1], cosine, sine);
        }
    }

    private static (double First, double Second) Turn(double first, double second, double cosine, double sine) =>
        ((cosine * first) + (sine * second), (cosine * second) - (sine * first));
}
