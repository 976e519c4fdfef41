namespace Stochastic.Chains.Kernels;

/// <summary>How many times its residual the error of a stationary vector can be: the longest mean time to a reference state.</summary>
/// <remarks>
/// Let A be I − P without a reference state k, h = A⁻¹ 1 the mean times to k (h_k = 0), G the matrix A⁻¹ bordered by zeros, and r = x (I − P)
/// over all states for a vector x of sum one. Then x − π = r G − (r h) π. As r sums to zero it is a mixture of differences e_i − e_l of total
/// weight ‖r‖₁ / 2, and for each of these the right-hand side has a 1-norm of at most h_i + h_l + |h_i − h_l| = 2 max(h_i, h_l). So
/// ‖x − π‖₁ ≤ ‖r‖₁ max h. A vector v > 0 with A v ≥ θ &gt; 0 proves that A has a non-negative inverse and that h ≤ v / θ.
/// </remarks>
internal static class MonotoneResidual
{
    /// <summary>An upper bound of the longest mean time, in steps; +∞ when the times do not pass the test.</summary>
    /// <param name="rows">The rates of the whole chain; from the states of the class they lead to states of the class only.</param>
    /// <param name="states">The states of the class.</param>
    /// <param name="reference">The reference state.</param>
    /// <param name="times">The mean times to the reference state by state, zero in it and outside the class; they need not be accurate.</param>
    internal static double Amplification<TRows>(TRows rows, ReadOnlySpan<int> states, int reference, ReadOnlySpan<double> times)
        where TRows : struct, IRateRows
    {
        var zeros = new double[times.Length];
        var longest = 0.0;
        var defect = double.NegativeInfinity;
        foreach (var state in states)
        {
            if (state == reference)
            {
                continue;
            }

            if (!(times[state] > 0))
            {
                return double.PositiveInfinity;
            }

            longest = Math.Max(longest, times[state]);
            var (residual, error) = rows.Differences(state, times, zeros).ResidualOf(1);
            defect = Math.Max(defect, Math.BitIncrement(residual + error));
        }

        return longest > 0 && defect < 1 ? Upward.Divide(longest, Upward.LowerDifference(1, defect)) : double.PositiveInfinity;
    }
}
