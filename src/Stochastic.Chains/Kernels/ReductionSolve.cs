namespace Stochastic.Chains.Kernels;

/// <summary>
/// Substitutions with the factors L, rates U and pivots s that <see cref="StateReduction"/> leaves in a table.
/// </summary>
/// <remarks>
/// Restricted to the eliminated states, the matrix A with the row sums of the rates (exits included) on its diagonal and minus the rates off
/// it is A = (I - L)(S - U). Both factors have non-negative inverses, so that for a non-negative right-hand side nothing is subtracted, and
/// every entry of a solution carries a small relative error. Right-hand sides with signs are solved as well, without that promise. A method
/// returns false when a product or quotient of nonzero numbers could have left the normal range of doubles; the result is then void.
/// </remarks>
internal static class ReductionSolve
{
    /// <summary>States taken together when there are several right-hand sides.</summary>
    private const int Block = 64;

    /// <summary>
    /// Writes the stationary distribution of a chain of which all states but the last were eliminated: x_k is the sum over i greater than k
    /// of x_i·L_ik, then all are divided by their sum.
    /// </summary>
    internal static bool Stationary(MatrixView table, int states, Span<double> distribution)
    {
        distribution[states - 1] = 1;
        if (!ExtendLeft(table, states, states - 1, distribution))
        {
            return false;
        }

        var sum = VectorLoops.Sum(distribution);
        if (!NormalRange.KeepsPivot(sum) || NormalRange.Extent(distribution).Smallest / sum < NormalRange.Smallest)
        {
            return false;
        }

        VectorLoops.Divide(distribution, sum, distribution);
        return true;
    }

    /// <summary>
    /// Extends weights of the kept states, rows pivots..rows-1, to the eliminated ones: x_k is the sum over i greater than k of x_i·L_ik.
    /// </summary>
    internal static bool ExtendLeft(MatrixView table, int rows, int pivots, Span<double> weights)
    {
        weights[..pivots].Clear();
        return AddFactors(table, rows, pivots, weights);
    }

    /// <summary>Solves y·A = b in place. The states are the first <paramref name="pivots"/> ones of the table.</summary>
    internal static bool SolveLeft(MatrixView table, ReadOnlySpan<double> sums, int pivots, Span<double> values)
    {
        for (var state = 0; state < pivots; state++)
        {
            if (values[state] == 0)
            {
                continue;
            }

            var rates = table.Row(state, state + 1, pivots - state - 1);
            var value = values[state] / sums[state];
            values[state] = value;
            if (!IsUsable(value) || !NormalRange.KeepsProduct(Math.Abs(value), NormalRange.SmallestNonzero(rates)))
            {
                return false;
            }

            VectorLoops.AddScaled(value, rates, values[(state + 1)..pivots]);
        }

        return AddFactors(table, pivots, pivots, values);
    }

    /// <summary>Solves A·h = c in place: forward c_i += L_ik·c_k, then backward h_k = (c_k + U_k·h)/s_k.</summary>
    internal static bool SolveRight(MatrixView table, ReadOnlySpan<double> sums, int pivots, Span<double> values)
    {
        var smallest = double.PositiveInfinity;
        for (var state = 0; state < pivots; state++)
        {
            var factors = table.Row(state, 0, state);
            values[state] += VectorLoops.Dot(factors, values[..state]);
            if (!NormalRange.KeepsProduct(NormalRange.SmallestNonzero(factors), smallest))
            {
                return false;
            }

            smallest = Math.Min(smallest, values[state] == 0 ? double.PositiveInfinity : Math.Abs(values[state]));
        }

        smallest = double.PositiveInfinity;
        for (var state = pivots - 1; state >= 0; state--)
        {
            var rates = table.Row(state, state + 1, pivots - state - 1);
            var total = values[state] + VectorLoops.Dot(rates, values[(state + 1)..pivots]);
            var value = total / sums[state];
            values[state] = value;
            if (!NormalRange.KeepsProduct(NormalRange.SmallestNonzero(rates), smallest) || (total != 0 && !IsUsable(value)))
            {
                return false;
            }

            smallest = Math.Min(smallest, total == 0 ? double.PositiveInfinity : Math.Abs(value));
        }

        return true;
    }

    /// <summary>
    /// Solves A·H = C in place for several non-negative right-hand sides, the columns of <paramref name="values"/> (pivots x count).
    /// </summary>
    /// <exception cref="OperationCanceledException">Cancellation was requested.</exception>
    internal static bool SolveRight(
        MatrixView table, ReadOnlySpan<double> sums, int pivots, MatrixView values, int count, InstructionSet instructions, WorkSharing sharing)
    {
        var smallestFactor = double.PositiveInfinity;
        var smallestRate = double.PositiveInfinity;
        var smallestForward = double.PositiveInfinity;
        var smallestBackward = double.PositiveInfinity;
        for (var first = 0; first < pivots; first += Block)
        {
            var next = Math.Min(first + Block, pivots);
            MatrixMultiply.Add(table.From(first, 0), values, values.From(first, 0), next - first, first, count, instructions, sharing);
            for (var state = first; state < next; state++)
            {
                var row = values.Row(state, 0, count);
                for (var before = first; before < state; before++)
                {
                    VectorLoops.AddScaled(table[state, before], values.Row(before, 0, count), row);
                }

                smallestFactor = Math.Min(smallestFactor, NormalRange.Extent(table.Row(state, 0, state)).Smallest);
                smallestForward = Math.Min(smallestForward, NormalRange.Extent(row).Smallest);
            }
        }

        for (var next = pivots; next > 0; next = (next - 1) / Block * Block)
        {
            var first = (next - 1) / Block * Block;
            MatrixMultiply.Add(
                table.From(first, next), values.From(next, 0), values.From(first, 0), next - first, pivots - next, count, instructions, sharing);
            for (var state = next - 1; state >= first; state--)
            {
                var row = values.Row(state, 0, count);
                for (var after = state + 1; after < next; after++)
                {
                    VectorLoops.AddScaled(table[state, after], values.Row(after, 0, count), row);
                }

                var (smallest, largest) = NormalRange.Extent(row);
                if (!(smallest / sums[state] >= NormalRange.Smallest && double.IsFinite(largest / sums[state])))
                {
                    return false;
                }

                VectorLoops.Divide(row, sums[state], row);
                smallestRate = Math.Min(smallestRate, NormalRange.Extent(table.Row(state, state + 1, pivots - state - 1)).Smallest);
                smallestBackward = Math.Min(smallestBackward, smallest / sums[state]);
            }
        }

        return NormalRange.KeepsProduct(smallestFactor, smallestForward) && NormalRange.KeepsProduct(smallestRate, smallestBackward);
    }

    private static bool AddFactors(MatrixView table, int rows, int pivots, Span<double> values)
    {
        for (var row = rows - 1; row > 0; row--)
        {
            var value = values[row];
            if (value == 0)
            {
                continue;
            }

            var factors = table.Row(row, 0, Math.Min(row, pivots));
            if (!IsUsable(value) || !NormalRange.KeepsProduct(Math.Abs(value), NormalRange.SmallestNonzero(factors)))
            {
                return false;
            }

            VectorLoops.AddScaled(value, factors, values[..factors.Length]);
        }

        return double.IsFinite(values[0]);
    }

    private static bool IsUsable(double value) => Math.Abs(value) >= NormalRange.Smallest && double.IsFinite(value);
}
