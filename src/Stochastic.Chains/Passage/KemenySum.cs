using Stochastic.Chains.Kernels;

namespace Stochastic.Chains.Passage;

/// <summary>Kemeny's constant from a table of mean first passage times: Σ_j π_j·m_ij with m_jj = 0 and π_j one over the steps between returns.</summary>
/// <param name="Constant">The sum from the first state of the class.</param>
/// <param name="RelativeErrorBound">A bound on its relative error.</param>
/// <param name="Spread">The difference between the largest and the smallest sum, relative to the smallest.</param>
internal sealed record KemenySum(double Constant, double RelativeErrorBound, double Spread)
{
    private const double UnitRoundoff = 1.1102230246251565e-16;

    /// <summary>Above this, what a term loses below the normal range does not count.</summary>
    private const double SmallestProved = 1e-280;

    /// <summary>The sums from all states of the one recurrent class.</summary>
    /// <param name="times">All mean times, row-major.</param>
    /// <param name="returns">Mean steps between returns to each state.</param>
    /// <param name="error">A bound on the relative error of each of them.</param>
    /// <param name="members">The states of the class.</param>
    internal static KemenySum Of(double[] times, double[] returns, double error, int[] members)
    {
        if (members.Length == 1)
        {
            return new KemenySum(0, 0, 0);
        }

        var sums = Array.ConvertAll(members, from => From(from, times, returns, members));
        var bound = sums.Min() >= SmallestProved ? Bound(error, members.Length) : double.PositiveInfinity;
        return new KemenySum(sums[0], bound, (sums.Max() - sums.Min()) / sums.Min());
    }

    private static double From(int from, double[] times, double[] returns, int[] members)
    {
        var row = times.AsSpan(from * returns.Length, returns.Length);
        var sum = default(CompensatedSum);
        foreach (var to in members)
        {
            if (to != from)
            {
                sum.Add(row[to] / returns[to]);
            }
        }

        return sum.Value;
    }

    /// <summary>
    /// Each term is a quotient of two numbers with that error, rounded once; the sum of n positive terms adds at most 2 u and n² u² (Neumaier
    /// 1974).
    /// </summary>
    private static double Bound(double error, int terms)
    {
        if (!(error < 1.0 / 4))
        {
            return double.PositiveInfinity;
        }

        var ofTerm = Upward.Divide(Upward.Multiply(2, error), Upward.LowerDifference(1, error));
        var roundings = UnitRoundoff * (4 + (terms * (double)terms * UnitRoundoff));
        return Upward.Add(ofTerm, Upward.Multiply(roundings, Upward.Add(1, ofTerm)));
    }
}
