namespace Stochastic.Chains.Kernels;

/// <summary>
/// A running sum carried in twice the working precision: the rounding error of each addition is found exactly (Knuth's two-sum)
/// and added up beside it. For n non-negative terms the relative error is about u + n²u² with u = 2⁻⁵³.
/// Source: Ogita, Rump and Oishi (2005), SIAM J. Sci. Comput. 26, 1955–1988.
/// </summary>
internal struct CompensatedSum
{
    private double _sum;
    private double _error;

    /// <summary>The sum so far; infinite or NaN only where the plain sum is, for then there is no rounding error to add.</summary>
    internal readonly double Value => double.IsFinite(_error) ? _sum + _error : _sum;

    internal static double Of(ReadOnlySpan<double> terms)
    {
        var sum = default(CompensatedSum);
        foreach (var term in terms)
        {
            sum.Add(term);
        }

        return sum.Value;
    }

    internal void Add(double term)
    {
        var total = _sum + term;
        var part = total - _sum;
        _error += (_sum - (total - part)) + (term - part);
        _sum = total;
    }
}
