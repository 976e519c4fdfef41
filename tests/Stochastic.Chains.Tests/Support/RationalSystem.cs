namespace Stochastic.Chains.Tests.Support;

/// <summary>
/// The inverse of the matrix of first steps over some states, in exact arithmetic: row sums of the off-diagonals on the diagonal, minus the
/// off-diagonals among the states elsewhere. Gauss-Jordan, for a handful of states.
/// </summary>
internal static class RationalSystem
{
    public static Rational[,] Inverse(SampleChain sample, int[] states)
    {
        var count = states.Length;
        var work = new Rational[count, 2 * count];
        for (var row = 0; row < count; row++)
        {
            work[row, count + row] = 1;
            for (var to = 0; to < sample.StateCount; to++)
            {
                var probability = to == states[row] ? 0 : Rational.FromDouble(sample.Matrix[states[row], to]);
                work[row, row] += probability;
                var column = Array.IndexOf(states, to);
                if (column >= 0)
                {
                    work[row, column] -= probability;
                }
            }
        }

        for (var pivot = 0; pivot < count; pivot++)
        {
            Eliminate(work, pivot, count);
        }

        var inverse = new Rational[count, count];
        for (var row = 0; row < count; row++)
        {
            for (var column = 0; column < count; column++)
            {
                inverse[row, column] = work[row, count + column];
            }
        }

        return inverse;
    }

    public static Rational[] Multiply(Rational[,] matrix, Rational[] vector) =>
        [.. Enumerable.Range(0, vector.Length).Select(row => Rational.Sum(vector.Select((value, column) => matrix[row, column] * value)))];

    private static void Eliminate(Rational[,] work, int pivot, int count)
    {
        var scale = work[pivot, pivot];
        for (var column = 0; column < 2 * count; column++)
        {
            work[pivot, column] /= scale;
        }

        for (var row = 0; row < count; row++)
        {
            var factor = work[row, pivot];
            if (row == pivot || factor.Sign == 0)
            {
                continue;
            }

            for (var column = 0; column < 2 * count; column++)
            {
                work[row, column] -= factor * work[pivot, column];
            }
        }
    }
}
