namespace Stochastic.Chains.Kernels;

/// <summary>
/// Elimination of a set R of states before a set L of others: h_R = W·h_L + w for every function with A·h = c, where W = N·A_RL,
/// w = N·c_R and N is the inverse of A_RR with the row sums of all rates of R on its diagonal. Nothing is subtracted.
/// </summary>
/// <remarks>
/// R is halved: the first half is eliminated before the second half and L, its effect on the second half is one matrix product, the
/// second half is eliminated before L, and one more product takes it out of the first. At the bottom N is formed for a few states at a
/// time, with the sum of everything right of them as one further column. About m³/3 + m²·q multiply-adds for m states before q others,
/// all but m·(48·q + 768) of them in matrix products.
/// </remarks>
internal sealed class PassageElimination(GuardedProduct product)
{
    /// <summary>The most states that are eliminated one by one.</summary>
    internal const int LargestBase = InPlaceProduct.MostRows;

    /// <summary>Terms of a row sum that are added up together.</summary>
    internal const int SumChunk = 64;

    private const int TileColumns = 24;
    private const int SmallestForTiles = 4 * TileColumns;

    /// <summary>Where a set of states is cut in two: whole tiles for large sets, whole bases for smaller ones.</summary>
    internal static int Half(int states)
    {
        var whole = states >= SmallestForTiles ? TileColumns : states > LargestBase ? LargestBase : 1;
        return ((states / 2) + (whole / 2)) / whole * whole;
    }

    /// <summary>
    /// Eliminates the states of a table [A_RR | A_RL | c_R] of <paramref name="states"/> rows and one column for each of them, each of the
    /// <paramref name="others"/>, and the holding times. On return A_RL and c_R hold W and w; the rest is void. False when a pivot is zero
    /// or out of range.
    /// </summary>
    internal bool Eliminate(MatrixView table, int states, int others)
    {
        if (states <= LargestBase)
        {
            return EliminateBase(table, states, others);
        }

        var first = Half(states);
        var second = states - first;
        if (!Eliminate(table, first, second + others))
        {
            return false;
        }

        product.AddWithLast(table.From(first, 0), table.From(0, first), table.From(first, first), second, first, second + others);
        if (!Eliminate(table.From(first, first), second, others))
        {
            return false;
        }

        product.AddWithLast(table.From(0, first), table.From(first, states), table.From(0, states), first, second, others);
        return true;
    }

    /// <summary>The sum of some rates, in chunks, so that few roundings lie between a term and the result.</summary>
    internal static double Sum(ReadOnlySpan<double> rates)
    {
        var sum = 0.0;
        for (var start = 0; start < rates.Length; start += SumChunk)
        {
            sum += VectorLoops.Sum(rates.Slice(start, Math.Min(SumChunk, rates.Length - start)));
        }

        return sum;
    }

    private bool EliminateBase(MatrixView table, int states, int others)
    {
        product.Cancellation.ThrowIfCancellationRequested();
        var width = (2 * states) + 1;
        Span<double> square = stackalloc double[states * width];
        Span<double> pivots = stackalloc double[states];
        Span<double> smallestRates = stackalloc double[states];
        square.Clear();
        for (var row = 0; row < states; row++)
        {
            table.Row(row, 0, states).CopyTo(square[(row * width)..]);
            square[(row * width) + states] = Sum(table.Row(row, states, others));
            square[(row * width) + states + 1 + row] = 1;
            if (product.MustLook)
            {
                smallestRates[row] = NormalRange.SmallestNonzero(table.Row(row, states, others + 1));
            }
        }

        if (!Forward(square, states, pivots) || !Backward(square, states, pivots))
        {
            return false;
        }

        var visits = square[(states + 1)..];
        if (product.MustLook)
        {
            Span<double> smallestVisits = stackalloc double[states];
            smallestVisits.Fill(double.PositiveInfinity);
            for (var row = 0; row < states; row++)
            {
                NormalRange.LowerToNonzero(visits.Slice(row * width, states), smallestVisits);
            }

            product.Note(NormalRange.KeepsProducts(smallestVisits, smallestRates));
        }

        InPlaceProduct.Multiply(visits, width, table.From(0, states), states, others + 1);
        return true;
    }

    /// <summary>
    /// Eliminates one state after the other in rows [B | rest | E], E the identity at first: pivot = remaining rates of the row, rest
    /// included.
    /// </summary>
    private bool Forward(Span<double> square, int states, Span<double> pivots)
    {
        var width = (2 * states) + 1;
        for (var state = 0; state < states; state++)
        {
            var rates = square.Slice((state * width) + state + 1, states + 1);
            var pivot = 0.0;
            foreach (var rate in rates[..(states - state)])
            {
                pivot += rate;
            }

            pivots[state] = pivot;
            if (!NormalRange.KeepsPivot(pivot))
            {
                return false;
            }

            var smallest = NormalRange.SmallestNonzero(rates);
            for (var row = state + 1; row < states; row++)
            {
                var rate = square[(row * width) + state];
                if (rate != 0)
                {
                    var factor = rate / pivot;
                    product.Note(factor >= NormalRange.Smallest && NormalRange.KeepsProduct(factor, smallest));
                    VectorLoops.AddScaled(factor, rates, square.Slice((row * width) + state + 1, states + 1));
                }
            }
        }

        return true;
    }

    /// <summary>Turns E into N, from the last row to the first.</summary>
    private bool Backward(Span<double> square, int states, Span<double> pivots)
    {
        var width = (2 * states) + 1;
        Span<double> smallest = stackalloc double[states];
        for (var state = states - 1; state >= 0; state--)
        {
            var visits = square.Slice((state * width) + states + 1, states);
            for (var after = state + 1; after < states; after++)
            {
                var rate = square[(state * width) + after];
                if (rate != 0)
                {
                    product.Note(NormalRange.KeepsProduct(rate, smallest[after]));
                    VectorLoops.AddScaled(rate, square.Slice((after * width) + states + 1, states), visits);
                }
            }

            VectorLoops.Divide(visits, pivots[state], visits);
            smallest[state] = NormalRange.SmallestNonzero(visits);
            if (!(smallest[state] >= NormalRange.Smallest))
            {
                return false;
            }
        }

        return true;
    }
}
