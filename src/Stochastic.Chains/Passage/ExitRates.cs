using Stochastic.Chains.Kernels;

namespace Stochastic.Chains.Passage;

/// <summary>The rates of some states into each exit, found in one pass.</summary>
internal static class ExitRates
{
    /// <summary>For each exit the rate of each member into it; several moves into one exit are added in twice the precision.</summary>
    internal static ScaledDoubleDouble[][] Of(TransitionMatrix matrix, int[] members, int[] exitOf, int exits, Func<int, bool> isExit)
    {
        var rates = Enumerable.Range(0, exits).Select(_ => new ScaledDoubleDouble[members.Length]).ToArray();
        int[] outside = [.. Enumerable.Range(0, matrix.Size).Where(isExit)];
        for (var k = 0; k < members.Length; k++)
        {
            if (matrix.Storage == MatrixStorage.Dense)
            {
                foreach (var to in outside)
                {
                    rates[exitOf[to]][k] += matrix[members[k], to];
                }

                continue;
            }

            foreach (var (to, rate) in matrix.Row(members[k]))
            {
                if (isExit(to))
                {
                    rates[exitOf[to]][k] += rate;
                }
            }
        }

        return rates;
    }
}
