using Stochastic.Chains.Kernels;

namespace Stochastic.Chains.Steps;

/// <summary>How far a computed power X of the step matrix can be off the exact power T.</summary>
/// <remarks>
/// <para>
/// Entry by entry: |ln(X / T)| ≤ <see cref="Relative"/>. A product of non-negative tables adds what its factors have, and its own
/// roundings. Dividing a row by its sum adds the logarithm of that sum, as measured; it is one but for the latest roundings, because both
/// factors have rows that sum to one. So n steps are off by about n times what one step and one product are.
/// </para>
/// <para>
/// Row by row, in the 1-norm: T T′ − X X′ = (T − X) X′ + T (T′ − X′). The row d = T − X sums to what the rounded row X misses of one, and is
/// confined to one cyclic class when it starts in a recurrent state. If all rows of X′ in that class have mass Σ_j m_j in common, then d X′
/// is at most |Σd| Σm + |d| (1 − Σm) (Doeblin; Dobrushin 1956). Once the rows of a power have become alike, errors are no longer doubled
/// by squaring, and a bound for 10⁹ steps is little larger than one for the time it takes to forget the start.
/// </para>
/// </remarks>
internal sealed class PowerErrors
{
    private const double UnitRoundoff = 1.0 / (1L << 53);
    private const double SecondOrder = 1.01;
    private const double LostToUnderflow = 1e-290;

    // Below this the entrywise bound cannot be improved by much.
    private const double SmallRelative = 1e-14;

    private PowerErrors(long steps, double relative, double rowSum, double[] rows)
    {
        Steps = steps;
        Relative = relative;
        RowSum = rowSum;
        Rows = rows;
    }

    /// <summary>The exponent of the power.</summary>
    internal long Steps { get; }

    /// <summary>The bound on |ln(X / T)| of every entry; +∞ when a product may have left the normal range of doubles.</summary>
    internal double Relative { get; }

    /// <summary>The bound on what the sum of a row of X misses of one.</summary>
    internal double RowSum { get; }

    /// <summary>The bound on the sum of |X − T| of each row.</summary>
    internal double[] Rows { get; }

    /// <summary>Of the step matrix itself, whose entries are off by so many roundings.</summary>
    internal static PowerErrors OfStep(int states, double roundings)
    {
        var relative = SecondOrder * roundings * UnitRoundoff;
        var rows = new double[states];
        Array.Fill(rows, SecondOrder * relative);
        return new PowerErrors(1, relative, SecondOrder * relative, rows);
    }

    /// <summary>Of a product whose rows were divided by their sums.</summary>
    /// <param name="left">Of the left factor.</param>
    /// <param name="right">Of the right factor.</param>
    /// <param name="leftTable">The left factor.</param>
    /// <param name="rightTable">The right factor.</param>
    /// <param name="largestCorrection">The largest |row sum − 1| that a row was divided by.</param>
    /// <param name="keepsRange">Whether all products stayed in the normal range.</param>
    /// <param name="groups">The cyclic classes.</param>
    internal static PowerErrors OfProduct(
        PowerErrors left, PowerErrors right, MatrixView leftTable, MatrixView rightTable, double largestCorrection, bool keepsRange, CyclicGroups groups)
    {
        var size = left.Rows.Length;
        var fresh = SecondOrder * ((RoundingsOfProduct(size) * UnitRoundoff) + largestCorrection);
        var relative = keepsRange ? left.Relative + right.Relative + fresh : double.PositiveInfinity;
        var rows = new double[size];
        Array.Fill(rows, SecondOrder * relative);
        if (relative > SmallRelative)
        {
            LowerByContraction(left, right, leftTable, rightTable, fresh, groups, rows);
        }

        return new PowerErrors(left.Steps + right.Steps, relative, SecondOrder * ((size / 4.0) + 7) * UnitRoundoff, rows);
    }

    /// <summary>With two roundings for each multiply-add, for nothing promises that it is fused, and two for the division of the row.</summary>
    private static double RoundingsOfProduct(int inner) => (2.0 * inner) + (inner / 192.0) + 5;

    private static void LowerByContraction(
        PowerErrors left, PowerErrors right, MatrixView leftTable, MatrixView rightTable, double fresh, CyclicGroups groups, double[] rows)
    {
        var size = rows.Length;
        var kept = KeptByGroup(rightTable, size, right.RowSum, groups);
        var largest = right.Rows.Max();
        for (var row = 0; row < size; row++)
        {
            var group = groups.After(row, left.Steps);
            var carried = left.RowSum + (left.Rows[row] * (group < 0 ? 1 + right.RowSum : kept[group]));
            var added = (SecondOrder * VectorLoops.Dot(leftTable.Row(row, 0, size), right.Rows)) + (left.Rows[row] * largest);
            rows[row] = Math.Min(rows[row], carried + added + (SecondOrder * fresh) + LostToUnderflow);
        }
    }

    /// <summary>How much of a difference between two rows a multiplication keeps at most, for differences inside each group.</summary>
    private static double[] KeptByGroup(MatrixView table, int size, double rowSum, CyclicGroups groups)
    {
        var kept = new double[groups.Members.Count];
        var least = new double[size];
        for (var group = 0; group < kept.Length; group++)
        {
            var members = groups.Members[group];
            table.Row(members[0], 0, size).CopyTo(least);
            foreach (var member in members.AsSpan(1))
            {
                VectorLoops.LowerTo(table.Row(member, 0, size), least);
            }

            var shared = VectorLoops.Sum(least) * (1 - (((size / 4.0) + 5) * UnitRoundoff));
            kept[group] = Math.Max(0, 1 + rowSum + UnitRoundoff - shared);
        }

        return kept;
    }
}
