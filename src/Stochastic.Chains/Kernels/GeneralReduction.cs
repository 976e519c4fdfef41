using System.Numerics;

namespace Stochastic.Chains.Kernels;

/// <summary>
/// State reduction in any arithmetic of non-negative numbers, one state at a time (Grassmann, Taksar and Heyman 1985; Sheskin 1985):
/// the careful twin of the fast kernel, for numbers with a wider range or more digits than a double. O(pivots · rows · columns).
/// </summary>
/// <typeparam name="TNumber">The arithmetic; only its additions, products and quotients are used.</typeparam>
/// <param name="table">
/// Rates, row-major: row = from, column = to. The first states are eliminated; columns beyond them are exits, targets or kept states,
/// rows beyond them kept states. The diagonal is never read. Overwritten by the factors: below the diagonal a_ik / s_k, above it the
/// rates at elimination time.
/// </param>
/// <param name="rows">The number of rows.</param>
/// <param name="columns">The number of columns.</param>
/// <param name="pivots">The number of states to eliminate, at most rows and columns.</param>
internal sealed class GeneralReduction<TNumber>(TNumber[] table, int rows, int columns, int pivots)
    where TNumber : struct, IAdditionOperators<TNumber, TNumber, TNumber>, IMultiplyOperators<TNumber, TNumber, TNumber>, IDivisionOperators<TNumber, TNumber, TNumber>
{
    private readonly TNumber[] _sums = new TNumber[pivots];

    /// <summary>The pivot of each eliminated state: the sum of its remaining rates.</summary>
    internal TNumber[] Sums => _sums;

    internal void Eliminate(Action<double>? progress, CancellationToken cancellation)
    {
        for (var k = 0; k < pivots; k++)
        {
            cancellation.ThrowIfCancellationRequested();
            progress?.Invoke((double)k / pivots);
            var pivotRow = table.AsSpan((k * columns) + k + 1, columns - k - 1);
            var sum = default(TNumber);
            foreach (var rate in pivotRow)
            {
                sum += rate;
            }

            _sums[k] = sum;
            for (var i = k + 1; i < rows; i++)
            {
                ref var entry = ref table[(i * columns) + k];
                if (EqualityComparer<TNumber>.Default.Equals(entry, default))
                {
                    continue;
                }

                entry /= sum;
                var row = table.AsSpan((i * columns) + k + 1, columns - k - 1);
                for (var j = 0; j < row.Length; j++)
                {
                    row[j] += entry * pivotRow[j];
                }
            }
        }
    }

    /// <summary>Extends weights of the kept states to the eliminated ones: x_k = Σ x_i a_ik / s_k over the states i eliminated later.</summary>
    internal void ExtendLeft(Span<TNumber> weights)
    {
        for (var k = pivots - 1; k >= 0; k--)
        {
            var weight = default(TNumber);
            for (var i = k + 1; i < rows; i++)
            {
                weight += weights[i] * table[(i * columns) + k];
            }

            weights[k] = weight;
        }
    }

    /// <summary>Solves for the eliminated states, in place: s_k h_k = c_k + Σ a_kj h_j, with the right-hand side carried along the elimination.</summary>
    internal void SolveRight(Span<TNumber> values)
    {
        for (var k = 0; k < pivots; k++)
        {
            for (var i = k + 1; i < pivots; i++)
            {
                values[i] += table[(i * columns) + k] * values[k];
            }
        }

        for (var k = pivots - 1; k >= 0; k--)
        {
            for (var j = k + 1; j < pivots; j++)
            {
                values[k] += table[(k * columns) + j] * values[j];
            }

            values[k] /= _sums[k];
        }
    }

    /// <summary>Solves y · A = b for the eliminated states, in place: forward with the rates, then backward with the factors.</summary>
    internal void SolveLeft(Span<TNumber> values)
    {
        for (var k = 0; k < pivots; k++)
        {
            values[k] /= _sums[k];
            for (var j = k + 1; j < pivots; j++)
            {
                values[j] += values[k] * table[(k * columns) + j];
            }
        }

        for (var k = pivots - 1; k >= 0; k--)
        {
            for (var i = k + 1; i < pivots; i++)
            {
                values[k] += values[i] * table[(i * columns) + k];
            }
        }
    }
}
