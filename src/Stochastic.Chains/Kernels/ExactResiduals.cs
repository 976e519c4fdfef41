namespace Stochastic.Chains.Kernels;

/// <summary>
/// The residuals of a refined solution without rounding, for systems so ill-conditioned that even the rounding of double-double would
/// count. About ten times as slow.
/// </summary>
/// <remarks>Numbers are scaled to at most 2⁹⁰⁰ or so; what is cut off below 2⁻¹¹²⁰ is counted as the smallest subnormal double. No bound is
/// left below 2⁻⁶⁰⁰, so that solving with it stays in the normal range.</remarks>
internal static class ExactResiduals
{
    /// <summary>For more states the sums would take too much memory.</summary>
    internal const int MostStates = 5000;

    private const int Unit = -1120;
    private const int Highest = 960;
    private const double SmallestBound = 2.409919865102884e-181;

    /// <summary>The imbalances of the first states, and upper bounds of their absolute values: see <see cref="StateFlows{TRows}"/>.</summary>
    internal static void FindImbalances<TRows>(
        TRows rows, ReadOnlySpan<int> states, double[] highs, double[] lows, double[] imbalances, double[] bounds)
        where TRows : struct, IRateRows
    {
        var sums = new ExactSums(rows.Count, Unit, Highest);
        foreach (var from in states)
        {
            var rates = rows.Rates(from);
            for (var position = 0; position < rates.Length; position++)
            {
                var to = rows.Column(from, position);
                if (to != from && rates[position] != 0)
                {
                    sums.MoveProduct(from, to, rates[position], highs[from]);
                    sums.MoveProduct(from, to, rates[position], lows[from]);
                }
            }
        }

        for (var k = 0; k < imbalances.Length; k++)
        {
            Read(sums, states[k], out imbalances[k], out bounds[k]);
        }
    }

    /// <summary>The right-hand sides minus Σ p (z − z_j), and upper bounds of their absolute values.</summary>
    internal static void FindDifferences<TRows>(
        TRows rows, ReadOnlySpan<int> states, ReadOnlySpan<double> given, double[] highs, double[] lows, double[] residuals, double[] bounds)
        where TRows : struct, IRateRows
    {
        const int Rest = 0;
        const int Sum = 1;
        for (var k = 0; k < states.Length; k++)
        {
            var sums = new ExactSums(2, Unit, Highest);
            var state = states[k];
            var rates = rows.Rates(state);
            sums.MoveProduct(Rest, Sum, given[k], 1);
            for (var position = 0; position < rates.Length; position++)
            {
                var column = rows.Column(state, position);
                if (column != state && rates[position] != 0)
                {
                    sums.MoveProduct(Sum, Rest, rates[position], highs[state]);
                    sums.MoveProduct(Sum, Rest, rates[position], lows[state]);
                    sums.MoveProduct(Rest, Sum, rates[position], highs[column]);
                    sums.MoveProduct(Rest, Sum, rates[position], lows[column]);
                }
            }

            Read(sums, Sum, out residuals[k], out bounds[k]);
        }
    }

    private static void Read(ExactSums sums, int index, out double residual, out double bound)
    {
        residual = sums.Value(index, 0);
        bound = Math.Max(Upward.Add(sums.UpperMagnitude(index, 0), double.Epsilon), SmallestBound);
    }
}
