namespace Stochastic.Chains.Kernels;

/// <summary>
/// The largest relative difference between the two sides of outflow · N = unit · I + rates · N, over all entries of a table N of some states.
/// O(transitions · states).
/// </summary>
/// <param name="members">The states, in the order of the table; moves to others count as outflow only.</param>
/// <param name="table">N, row-major.</param>
/// <param name="unit">What stands on the diagonal of the right-hand side.</param>
internal readonly struct InverseResidual(int[] members, double[] table, double unit) : IRateAlgorithm<double>
{
    public double Run<TRows>(TRows rows)
        where TRows : struct, IRateRows
    {
        var positionOf = new int[rows.Count];
        positionOf.AsSpan().Fill(-1);
        for (var position = 0; position < members.Length; position++)
        {
            positionOf[members[position]] = position;
        }

        var inflow = new double[members.Length];
        var largest = 0.0;
        for (var row = 0; row < members.Length; row++)
        {
            inflow.AsSpan().Clear();
            inflow[row] = unit;
            var outflow = default(CompensatedSum);
            var rates = rows.Rates(members[row]);
            for (var k = 0; k < rates.Length; k++)
            {
                var to = rows.Column(members[row], k);
                if (to == members[row] || rates[k] == 0)
                {
                    continue;
                }

                outflow.Add(rates[k]);
                if (positionOf[to] >= 0)
                {
                    VectorLoops.AddScaled(rates[k], table.AsSpan(positionOf[to] * members.Length, members.Length), inflow);
                }
            }

            for (var column = 0; column < inflow.Length; column++)
            {
                var left = outflow.Value * table[(row * members.Length) + column];
                largest = left == 0 && inflow[column] == 0 ? largest : Math.Max(largest, Math.Abs((inflow[column] / left) - 1));
            }
        }

        return largest;
    }
}
