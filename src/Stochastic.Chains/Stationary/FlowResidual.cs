using Stochastic.Chains.Kernels;

namespace Stochastic.Chains.Stationary;

/// <summary>How far the flows into and out of the states of a recurrent class are from balance.</summary>
internal static class FlowResidual
{
    /// <summary>
    /// The largest |inflow − outflow| / outflow over the states, from the off-diagonal probabilities. Each state's flows are scaled by
    /// its outflow before they are summed, so that flows beyond the range of a double count too.
    /// </summary>
    internal static double Of(TransitionMatrix matrix, int[] members, double[] values)
    {
        var scales = new long[values.Length];
        var outflows = new double[values.Length];
        foreach (var state in members)
        {
            var outflow = (ScaledDouble)values[state] * OffDiagonalSum(matrix, state);
            scales[state] = -outflow.Exponent;
            outflows[state] = outflow.ToDouble(scales[state]);
        }

        var inflows = new CompensatedSum[values.Length];
        foreach (var from in members)
        {
            foreach (var (to, rate) in matrix.Row(from))
            {
                if (to != from)
                {
                    inflows[to].Add(((ScaledDouble)values[from] * rate).ToDouble(scales[to]));
                }
            }
        }

        return members.Max(state => Math.Abs(inflows[state].Value - outflows[state]) / outflows[state]);
    }

    private static double OffDiagonalSum(TransitionMatrix matrix, int row)
    {
        var sum = default(CompensatedSum);
        foreach (var (to, rate) in matrix.Row(row))
        {
            if (to != row)
            {
                sum.Add(rate);
            }
        }

        return sum.Value;
    }
}
