using Stochastic.Chains.Kernels;

namespace Stochastic.Chains.Stationary;

/// <summary>How far the flows into and out of the states of a recurrent class are from balance.</summary>
internal static class FlowResidual
{
    private const int ScaledExponent = 900;
    private const double SmallestFlow = 1.1830521861667747e-271;

    /// <summary>The largest |inflow − outflow| / outflow over the states, from the off-diagonal probabilities.</summary>
    internal static double Of(StationaryProblem problem, double[] shares)
    {
        var fast = problem.Matrix.OnRates<double, Doubled>(new Doubled(problem, shares));
        return double.IsNaN(fast) ? Scaled(problem, shares) : fast;
    }

    /// <summary>With an exponent of its own for each flow, for flows beyond the range of a double.</summary>
    private static double Scaled(StationaryProblem problem, ReadOnlySpan<double> shares)
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

    /// <summary>In twice the digits of a double; NaN where a flow could leave its range.</summary>
    private readonly struct Doubled(StationaryProblem problem, double[] shares) : IRateAlgorithm<double>
    {
        public double Run<TRows>(TRows rows)
            where TRows : struct, IRateRows
        {
            var members = problem.Members;
            if (!ScaledWeights.TryScale(members, problem.Spread(shares), ScaledExponent, out var weights, out _))
            {
                return double.NaN;
            }

            var flows = new StateFlows<TRows>(rows, members);
            var imbalances = new double[shares.Length];
            flows.FindImbalances(weights, new double[weights.Length], imbalances, new double[shares.Length]);
            var largest = 0.0;
            for (var k = 0; k < imbalances.Length; k++)
            {
                var outflow = weights[members[k]] * flows.Outflow(k);
                if (outflow < SmallestFlow)
                {
                    return double.NaN;
                }

                largest = Math.Max(largest, Math.Abs(imbalances[k]) / outflow);
            }

            return largest;
        }
    }
}
