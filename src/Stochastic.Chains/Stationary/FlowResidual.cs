using Stochastic.Chains.Kernels;

namespace Stochastic.Chains.Stationary;

/// <summary>How far the flows into and out of the states of a recurrent class are from balance.</summary>
internal static class FlowResidual
{
    /// <summary>
    /// The largest |inflow − outflow| / outflow over the states, from the off-diagonal probabilities. Each state's flows are scaled by
    /// its outflow before they are summed, so that flows beyond the range of a double count too.
    /// </summary>
    internal static double Of(StationaryProblem problem, ReadOnlySpan<double> shares)
    {
        var largest = 0.0;
        for (var to = 0; to < shares.Length; to++)
        {
            var outflow = (ScaledDouble)shares[to] * problem.Outflows[to];
            var inflow = default(CompensatedSum);
            var sources = problem.Inflows.RowColumns(to);
            var rates = problem.Inflows.RowValues(to);
            for (var k = 0; k < sources.Length; k++)
            {
                inflow.Add(((ScaledDouble)shares[sources[k]] * rates[k]).ToDouble(-outflow.Exponent));
            }

            var scaledOutflow = outflow.ToDouble(-outflow.Exponent);
            largest = Math.Max(largest, Math.Abs(inflow.Value - scaledOutflow) / scaledOutflow);
        }

        return largest;
    }
}
