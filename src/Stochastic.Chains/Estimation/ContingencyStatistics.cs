using Stochastic.Chains.Kernels;

namespace Stochastic.Chains.Estimation;

/// <summary>The statistics of several tables together.</summary>
internal sealed record ContingencyStatistics(double LikelihoodRatio, double ChiSquare, double SmallestExpected, ModelFit Null, ModelFit Alternative)
{
    internal static ContingencyStatistics Of(IReadOnlyList<ContingencyTable> tables)
    {
        var (ratio, square) = (default(CompensatedSum), default(CompensatedSum));
        var (pooled, separate) = (default(CompensatedSum), default(CompensatedSum));
        var (nullParameters, parameters, observations) = (0L, 0L, 0L);
        var smallest = double.PositiveInfinity;
        foreach (var table in tables.Where(table => table.Total > 0))
        {
            foreach (var row in table.UsedRows)
            {
                foreach (var column in table.UsedColumns)
                {
                    var (expected, deviation) = (table.Expected(row, column), table.Deviation(row, column));
                    ratio.Add(2 * table.HalfLikelihoodRatio(row, column));
                    square.Add(expected * deviation * deviation);
                    smallest = table.DegreesOfFreedom > 0 ? Math.Min(smallest, expected) : smallest;
                }
            }

            pooled.Add(table.PooledLogLikelihood());
            separate.Add(table.SeparateLogLikelihood());
            nullParameters += table.UsedColumns.Length - 1;
            parameters += table.UsedRows.Length * (table.UsedColumns.Length - 1L);
            observations += table.Total;
        }

        return new ContingencyStatistics(
            ratio.Value,
            square.Value,
            smallest,
            new ModelFit(pooled.Value, nullParameters, observations),
            new ModelFit(separate.Value, parameters, observations));
    }
}
