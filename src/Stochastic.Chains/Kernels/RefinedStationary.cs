namespace Stochastic.Chains.Kernels;

/// <summary>
/// Iterative refinement of a stationary distribution, with residuals in double-double, and the componentwise bound that the positive
/// inverse of the system without a reference state gives.
/// </summary>
/// <remarks>
/// Let k be the reference state, A the matrix I − P without it, and v the invariant vector with v_k = z_k for a positive vector z. With the
/// imbalances r_j = Σ_i z_i p_ij − z_j Σ_l p_jl one has (v − z) A = r outside k, and A⁻¹ is non-negative, so |v − z| ≤ |r| A⁻¹: one
/// substitution with the factors, free of subtraction, of upper bounds of |r| that count the rounding of computing it. The relative error
/// β of that substitution makes the result at most 1 / (1 − β) larger. If it is at most ω z everywhere, the shares z / Σz are within
/// 2 ω / (1 − ω) of those of v, which are the truth. Sum, quotient and final rounding are counted. Refinement contracts while κ u is
/// small, κ being about the expected number of jumps until k, so k should have a large share; the bound does not depend on that.
/// </remarks>
internal static class RefinedStationary
{
    private const int ScaledExponent = 900;

    /// <summary>
    /// Refines the shares of one recurrent class in place and returns a bound on the relative error of each; +∞ when they were left as they
    /// are because refinement does not contract or a number left the range.
    /// </summary>
    /// <param name="rows">The rates of the whole chain; from the states of the class they lead to states of the class only.</param>
    /// <param name="states">The states of the class in the order of the factors, the reference state last.</param>
    /// <param name="values">The shares by state of the chain.</param>
    /// <param name="factors">The factors of the system without the reference state.</param>
    /// <param name="solveError">A bound below 1 on the relative error of solving with a non-negative right-hand side.</param>
    /// <param name="reach">How far the shares may be from the truth.</param>
    /// <param name="cancellation">Looked at in each step.</param>
    internal static double Refine<TRows, TFactors>(
        TRows rows, ReadOnlySpan<int> states, Span<double> values, TFactors factors, double solveError, RefinementReach reach,
        CancellationToken cancellation)
        where TRows : struct, IRateRows
        where TFactors : IFactors
    {
        if (!ScaledWeights.TryScale(states, values, ScaledExponent, out var highs, out _))
        {
            return double.PositiveInfinity;
        }

        int[] order = [.. states];
        var others = order[..^1];
        var refinement = new Refinement(others, highs, reach);
        var flows = new StateFlows<TRows>(rows, states);
        Func<double[], bool> solve = numbers => factors.SolveLeft(numbers);
        Func<double> findError = () => LargestError(others, refinement, factors, solveError);
        refinement.Improve(
            () => flows.FindImbalances(highs, refinement.Lows, refinement.Residuals, refinement.Bounds), findError, solve, cancellation);
        if (refinement.NeedsExactResiduals)
        {
            refinement.Improve(
                () => ExactResiduals.FindImbalances(rows, order, highs, refinement.Lows, refinement.Residuals, refinement.Bounds),
                findError,
                solve,
                cancellation);
        }

        return refinement.Error < 1 ? Normalize(states, refinement, values) : double.PositiveInfinity;
    }

    /// <summary>A bound on |v_j − z_j| / z_j over the states.</summary>
    private static double LargestError<TFactors>(
        int[] states, Refinement refinement, TFactors factors, double solveError)
        where TFactors : IFactors
    {
        var bounds = refinement.Bounds;
        if (!factors.SolveLeft(bounds))
        {
            return double.PositiveInfinity;
        }

        var largest = 0.0;
        for (var k = 0; k < bounds.Length; k++)
        {
            largest = Math.Max(largest, Upward.Divide(bounds[k], refinement.Highs[states[k]] * (1 - (4 * Refinement.UnitRoundoff))));
        }

        return Upward.Divide(largest, Upward.LowerDifference(1, solveError));
    }

    /// <summary>Writes the shares, each rounded once, and returns the bound on their relative errors.</summary>
    private static double Normalize(ReadOnlySpan<int> states, Refinement refinement, Span<double> values)
    {
        var (highs, lows, error) = (refinement.BestHighs, refinement.BestLows, refinement.Error);
        var total = (High: 0.0, Low: 0.0);
        foreach (var state in states)
        {
            total = DoubleDouble.Add(total.High, total.Low, highs[state], lows[state]);
        }

        var shares = new double[states.Length];
        for (var k = 0; k < shares.Length; k++)
        {
            var state = states[k];
            shares[k] = DoubleDouble.Divide(highs[state], lows[state], total.High, total.Low).High;
            if (!double.IsNormal(shares[k]))
            {
                return double.PositiveInfinity;
            }
        }

        for (var k = 0; k < shares.Length; k++)
        {
            values[states[k]] = shares[k];
        }

        var ratio = Upward.Divide(2 * error, Upward.LowerDifference(1, error));
        var rounding = Upward.Add(Refinement.UnitRoundoff, 2 * DoubledLoops.SumError(states.Length));
        return Upward.Add(ratio, Upward.Multiply(rounding, Upward.Add(1, ratio)));
    }
}
