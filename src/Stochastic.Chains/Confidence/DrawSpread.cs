using Stochastic.Chains.Kernels;

namespace Stochastic.Chains.Confidence;

/// <summary>How the answers of many draws are spread. NaN stands for a draw without an answer.</summary>
internal sealed record DrawSpread(Interval Interval, double Mean, double StandardDeviation, int Refused, int Infinite, double LowerError, double UpperError)
{
    internal static DrawSpread Of(double[] values, double level)
    {
        var refused = values.Count(double.IsNaN);
        var infinite = values.Count(double.IsInfinity);
        var (mean, deviation) = refused + infinite > 0 ? (double.PositiveInfinity, double.PositiveInfinity) : Moments(values);
        var tail = (1 - level) / 2;
        var ascending = Ascending(values, refusedAs: double.NegativeInfinity);
        var lower = LowerRank(values.Length, tail);
        var (lowerEnd, lowerError) = (ascending[lower], RankError(ascending, lower, tail));
        ascending = Ascending(values, refusedAs: double.PositiveInfinity);
        var upper = values.Length - 1 - lower;
        return new DrawSpread(new Interval(lowerEnd, ascending[upper], level), mean, deviation, refused, infinite, lowerError, RankError(ascending, upper, tail));
    }

    /// <summary>The rank from 0 of the lower end; with n draws the k-th smallest estimates the quantile k/(n + 1).</summary>
    internal static int LowerRank(int draws, double tail) => (int)Math.Floor((draws + 1) * tail) - 1;

    private static double[] Ascending(double[] values, double refusedAs)
    {
        var ascending = Array.ConvertAll(values, value => double.IsNaN(value) ? refusedAs : value);
        Array.Sort(ascending);
        return ascending;
    }

    private static (double Mean, double Deviation) Moments(double[] values)
    {
        var mean = CompensatedSum.Of(values) / values.Length;
        var squares = default(CompensatedSum);
        foreach (var value in values)
        {
            squares.Add((value - mean) * (value - mean));
        }

        return (mean, Math.Sqrt(squares.Value / Math.Max(1, values.Length - 1)));
    }

    /// <summary>
    /// Half the distance between the order statistics one standard deviation of the rank away. Source: David and Nagaraja, Order Statistics, 3rd ed.
    /// 2003, section 7.1 (distribution-free intervals for quantiles).
    /// </summary>
    private static double RankError(double[] ascending, int rank, double tail)
    {
        var step = (int)Math.Ceiling(Math.Sqrt(ascending.Length * tail * (1 - tail)));
        var half = (ascending[Math.Min(ascending.Length - 1, rank + step)] - ascending[Math.Max(0, rank - step)]) / 2;
        return double.IsFinite(half) ? half : double.PositiveInfinity;
    }
}
