using System.Numerics;

namespace Stochastic.Chains.Kernels;

/// <summary>
/// The recursion of <see cref="FirstPassageReduction"/> in any arithmetic of non-negative numbers, one state at a time: the careful twin
/// of the fast kernel, for numbers with a wider range than a double.
/// </summary>
/// <typeparam name="TNumber">The arithmetic; only its additions, products and quotients are used.</typeparam>
/// <param name="times">Receives the times, row-major, states x kept.</param>
/// <param name="columns">The number of kept states, columns of <paramref name="times"/>.</param>
/// <param name="progress">Told the part that is done; null when nobody listens.</param>
/// <param name="cancellation">Looked at once for each eliminated state.</param>
internal sealed class GeneralFirstPassage<TNumber>(TNumber[] times, int columns, Action<double>? progress, CancellationToken cancellation)
    where TNumber : struct, IAdditionOperators<TNumber, TNumber, TNumber>, IMultiplyOperators<TNumber, TNumber, TNumber>, IDivisionOperators<TNumber, TNumber, TNumber>
{
    private int _filled;

    /// <summary>Finds the times to the kept states; see <see cref="FirstPassageReduction.Find"/>.</summary>
    /// <param name="rates">A row for each state: its rates to all states, the kept ones first, then its holding time.</param>
    /// <param name="states">The number of states.</param>
    internal void Find(TNumber[] rates, int states)
    {
        if (columns < states)
        {
            SolveAmong(rates, states, 0, columns, columns, 0);
        }
        else
        {
            Solve(rates, states, 0);
        }
    }

    private void Solve(TNumber[] rates, int states, int place)
    {
        if (states == 1)
        {
            progress?.Invoke((double)++_filled / columns);
            return;
        }

        var first = states / 2;
        SolveAmong(rates, states, 0, first, first, place);
        SolveAmong(rates, states, first, states - first, 0, place);
    }

    /// <summary>Fills the columns of the kept states, whose first one is <paramref name="keep"/>; the dropped ones begin at <paramref name="drop"/>.</summary>
    private void SolveAmong(TNumber[] rates, int states, int keep, int kept, int drop, int place)
    {
        var width = states + 1;
        var dropped = states - kept;
        var before = new TNumber[dropped * width];
        for (var row = 0; row < dropped; row++)
        {
            var source = rates.AsSpan((drop + row) * width, width);
            var target = before.AsSpan(row * width, width);
            source.Slice(drop, dropped).CopyTo(target);
            source.Slice(keep, kept).CopyTo(target[dropped..]);
            target[states] = source[states];
        }

        Eliminate(before, dropped, width);
        var among = new TNumber[kept * (kept + 1)];
        for (var row = 0; row < kept; row++)
        {
            var source = rates.AsSpan((keep + row) * width, width);
            var target = among.AsSpan(row * (kept + 1), kept + 1);
            source.Slice(keep, kept).CopyTo(target);
            target[kept] = source[states];
            for (var state = 0; state < dropped; state++)
            {
                AddScaled(source[drop + state], before.AsSpan((state * width) + dropped, kept + 1), target);
            }
        }

        Solve(among, kept, place + keep);
        for (var row = 0; row < dropped; row++)
        {
            var target = times.AsSpan(((place + drop + row) * columns) + place + keep, kept);
            target.Fill(before[(row * width) + states]);
            for (var state = 0; state < kept; state++)
            {
                AddScaled(before[(row * width) + dropped + state], times.AsSpan(((place + keep + state) * columns) + place + keep, kept), target);
            }
        }
    }

    /// <summary>Turns the columns right of the first states into W and w.</summary>
    private void Eliminate(TNumber[] table, int states, int width)
    {
        var pivots = new TNumber[states];
        for (var state = 0; state < states; state++)
        {
            cancellation.ThrowIfCancellationRequested();
            var rates = table.AsSpan((state * width) + state + 1, width - state - 1);
            foreach (var rate in rates[..^1])
            {
                pivots[state] += rate;
            }

            for (var row = state + 1; row < states; row++)
            {
                AddScaled(table[(row * width) + state] / pivots[state], rates, table.AsSpan((row * width) + state + 1, rates.Length));
            }
        }

        for (var state = states - 1; state >= 0; state--)
        {
            cancellation.ThrowIfCancellationRequested();
            var weights = table.AsSpan((state * width) + states, width - states);
            for (var after = state + 1; after < states; after++)
            {
                AddScaled(table[(state * width) + after], table.AsSpan((after * width) + states, weights.Length), weights);
            }

            for (var column = 0; column < weights.Length; column++)
            {
                weights[column] /= pivots[state];
            }
        }
    }

    private static void AddScaled(TNumber factor, ReadOnlySpan<TNumber> source, Span<TNumber> target)
    {
        if (EqualityComparer<TNumber>.Default.Equals(factor, default))
        {
            return;
        }

        for (var column = 0; column < source.Length; column++)
        {
            target[column] += factor * source[column];
        }
    }
}
