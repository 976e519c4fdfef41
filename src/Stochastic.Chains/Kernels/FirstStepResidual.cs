namespace Stochastic.Chains.Kernels;

/// <summary>
/// The largest relative difference between the two sides of outflow · x = given + flow-weighted x of the next states. Rows whose numbers
/// leave the middle of the range of doubles are computed once more with exponents of their own.
/// </summary>
/// <param name="members">The states whose equations are looked at.</param>
/// <param name="given">The given term of each member.</param>
/// <param name="values">The values x by state; 0 where they do not count.</param>
internal readonly struct FirstStepResidual(int[] members, ScaledDoubleDouble[] given, ScaledDoubleDouble[] values) : IRateAlgorithm<double>
{
    private const double Least = 1e-250;
    private const double Most = 1e250;

    public double Run<TRows>(TRows rows)
        where TRows : struct, IRateRows
    {
        var doubles = Array.ConvertAll(values, value => value.ToDouble());
        var ones = new double[doubles.Length];
        ones.AsSpan().Fill(1);
        var largest = 0.0;
        for (var k = 0; k < members.Length; k++)
        {
            var member = members[k];
            var inflow = given[k].ToDouble() + rows.Dot(member, doubles);
            var outflow = rows.Dot(member, ones) * doubles[member];
            var isOrdinary = inflow is > Least and < Most && outflow is > Least and < Most;
            largest = Math.Max(largest, isOrdinary ? Math.Abs((inflow / outflow) - 1) : Careful(rows, member, given[k]));
        }

        return largest;
    }

    private double Careful<TRows>(TRows rows, int member, ScaledDoubleDouble inflow)
        where TRows : struct, IRateRows
    {
        var outflow = default(ScaledDoubleDouble);
        var rates = rows.Rates(member);
        for (var position = 0; position < rates.Length; position++)
        {
            var to = rows.Column(member, position);
            if (to != member && rates[position] != 0)
            {
                outflow += rates[position];
                inflow += rates[position] * values[to];
            }
        }

        outflow *= values[member];
        return outflow.IsZero ? (inflow.IsZero ? 0 : 1) : Math.Abs((inflow / outflow).ToDouble() - 1);
    }
}
