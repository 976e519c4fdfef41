using Stochastic.Chains.Tests.Support;

namespace Stochastic.Chains.Tests.SupportTests;

/// <summary>Textbook Gauss-Jordan elimination in fractions: slow, and independent of the oracle it checks.</summary>
internal static class PlainElimination
{
    public static Rational[] Solve(Rational[][] matrix, Rational[] rightSide)
    {
        var rows = matrix.Select((row, i) => row.Append(rightSide[i]).ToArray()).ToArray();
        for (var column = 0; column < rows.Length; column++)
        {
            var pivot = Enumerable.Range(column, rows.Length - column).First(i => !rows[i][column].IsZero);
            (rows[column], rows[pivot]) = (rows[pivot], rows[column]);
            rows[column] = Array.ConvertAll(rows[column], value => value / rows[column][column]);
            for (var i = 0; i < rows.Length; i++)
            {
                if (i != column && !rows[i][column].IsZero)
                {
                    var factor = rows[i][column];
                    rows[i] = [.. rows[i].Zip(rows[column], (mine, theirs) => mine - (factor * theirs))];
                }
            }
        }

        return Array.ConvertAll(rows, row => row[^1]);
    }

    /// <summary>pi (D - A) = 0 with the last equation replaced by sum = 1.</summary>
    public static Rational[] Stationary(ExactChain chain)
    {
        var outflow = OutflowMinusMoves(chain, [.. Enumerable.Range(0, chain.StateCount)]);
        var transposed = Enumerable.Range(0, chain.StateCount)
            .Select(i => i == chain.StateCount - 1
                ? Enumerable.Repeat(Rational.One, chain.StateCount).ToArray()
                : outflow.Select(row => row[i]).ToArray())
            .ToArray();
        return Solve(transposed, [.. Enumerable.Repeat(Rational.Zero, chain.StateCount - 1), 1]);
    }

    /// <summary>(D - A) x = b over the given states.</summary>
    public static Rational[] SolveAmong(ExactChain chain, int[] states, Func<int, Rational> rightSide) =>
        Solve(OutflowMinusMoves(chain, states), Array.ConvertAll(states, state => rightSide(state)));

    private static Rational[][] OutflowMinusMoves(ExactChain chain, int[] states) => Array.ConvertAll(states, from =>
    {
        var moves = chain.Row(from).Moves;
        return Array.ConvertAll(states, to => to == from
            ? Rational.Sum(moves.Select(move => move.Probability))
            : -Rational.Sum(moves.Where(move => move.To == to).Select(move => move.Probability)));
    });
}
