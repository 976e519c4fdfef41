using Stochastic.Chains.Kernels;

namespace Stochastic.Chains.Stationary;

/// <summary>The aggregation half of a cycle: the masses of the groups that balance the flows between them, by state reduction.</summary>
internal static class GroupMasses
{
    private const int BytesPerEntry = 16;

    internal static void Rescale(StationaryProblem problem, Components groups, double[] values)
    {
        var count = groups.Count;
        problem.Options.RequireMemory(count, (long)count * count * BytesPerEntry);

        // With x_i / X_g left out on both sides, the flows themselves are the rates and the unknowns are factors of the masses.
        var flows = new ScaledDouble[count * count];
        for (var to = 0; to < values.Length; to++)
        {
            var sources = problem.Inflows.RowColumns(to);
            var rates = problem.Inflows.RowValues(to);
            for (var k = 0; k < sources.Length; k++)
            {
                flows[(groups.ComponentOf[sources[k]] * count) + groups.ComponentOf[to]] += (ScaledDouble)values[sources[k]] * rates[k];
            }
        }

        var reduction = new GeneralReduction<ScaledDouble>(flows, count, count, count - 1);
        reduction.Eliminate(progress: null, problem.Options.CancellationToken);
        var factors = new ScaledDouble[count];
        factors[^1] = ScaledDouble.One;
        reduction.ExtendLeft(factors);
        var largest = factors.Max(factor => factor.Exponent);
        for (var state = 0; state < values.Length; state++)
        {
            values[state] *= factors[groups.ComponentOf[state]].ToDouble(-largest);
        }
    }
}
