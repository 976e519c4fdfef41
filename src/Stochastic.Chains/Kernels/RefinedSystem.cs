namespace Stochastic.Chains.Kernels;

/// <summary>
/// Iterative refinement of means and probabilities of first passage, with residuals in double-double, and the componentwise bound that
/// the positive inverse of the system gives.
/// </summary>
/// <remarks>
/// The equations are Σ_j p_ij (h_i − h_j) = c_i over some states, with h given elsewhere: A h = c plus what is given. Let z approximate h and
/// |c_i − Σ_j p_ij (z_i − z_j)| be at most R_i, the rounding of computing it included. A⁻¹ is non-negative, so |z − h| ≤ A⁻¹ R. Where every
/// c_i is positive and h is zero elsewhere, R ≤ ρ c gives |z − h| ≤ ρ A⁻¹ c = ρ h at once. Where that is not enough (a fast state beside
/// slow ones), A⁻¹ R is one substitution with the factors, free of subtraction; its own relative error β makes it at most 1 / (1 − β)
/// larger. The answer is z rounded to doubles. All numbers are scaled by a power of two, up to where underflow is out of reach.
/// Refinement contracts while κ u is small, κ being about the expected number of jumps; the bound does not depend on that.
/// </remarks>
internal static class RefinedSystem
{
    private const int ScaledExponent = 900;
    private const double EnoughByRatio = Refinement.UnitRoundoff / 16;
    private const double SmallestBound = 2.409919865102884e-181;

    /// <summary>
    /// Refines a solution in place and returns a bound on the relative error of each of its entries; +∞ when it was left as it is because
    /// refinement does not contract or a number left the range.
    /// </summary>
    /// <param name="rows">The rates of the whole chain.</param>
    /// <param name="states">The states of the system, in the order of the factors.</param>
    /// <param name="given">The right-hand side c, in that order; not negative.</param>
    /// <param name="values">The solution by state of the chain, with the given values at all other states.</param>
    /// <param name="factors">The factors of the system.</param>
    /// <param name="solveError">A bound below 1 on the relative error of solving with a non-negative right-hand side.</param>
    /// <param name="cancellation">Looked at in each step.</param>
    internal static double Refine<TRows, TFactors>(
        TRows rows, ReadOnlySpan<int> states, ReadOnlySpan<double> given, Span<double> values, TFactors factors, double solveError,
        CancellationToken cancellation)
        where TRows : struct, IRateRows
        where TFactors : IFactors
    {
        var scale = ScaledExponent - Math.ILogB(Largest(values));
        var highs = Scaled(values, scale);
        var rightHandSide = Scaled(given, scale);
        if (!IsExact(highs) || !IsExact(rightHandSide))
        {
            return double.PositiveInfinity;
        }

        int[] order = [.. states];
        var refinement = new Refinement(order, highs);
        var isTimes = given.IndexOf(0.0) < 0 && IsZeroElsewhere(states, values);
        Func<double[], bool> solve = numbers => factors.SolveRight(numbers);
        Func<double> findError = () => LargestError(order, rightHandSide, isTimes, refinement, factors, solveError);
        refinement.Improve(() => FindResiduals(rows, order, rightHandSide, refinement), findError, solve, cancellation);
        if (refinement.NeedsExactResiduals)
        {
            refinement.Improve(
                () => ExactResiduals.FindDifferences(
                    rows, order, rightHandSide, highs, refinement.Lows, refinement.Residuals, refinement.Bounds),
                findError,
                solve,
                cancellation);
        }

        return refinement.Error < 1 ? Rounded(states, refinement, scale, values) : double.PositiveInfinity;
    }

    private static double Largest(ReadOnlySpan<double> values)
    {
        var largest = double.Epsilon;
        foreach (var value in values)
        {
            largest = Math.Max(largest, value);
        }

        return largest;
    }

    private static double[] Scaled(ReadOnlySpan<double> values, int scale)
    {
        var scaled = values.ToArray();
        for (var k = 0; k < scaled.Length; k++)
        {
            scaled[k] = Math.ScaleB(scaled[k], scale);
        }

        return scaled;
    }

    private static bool IsExact(double[] scaled) => Array.TrueForAll(scaled, value => value == 0 || double.IsNormal(value));

    private static bool IsZeroElsewhere(ReadOnlySpan<int> states, ReadOnlySpan<double> values)
    {
        var rest = values.ToArray();
        foreach (var state in states)
        {
            rest[state] = 0;
        }

        return !rest.AsSpan().ContainsAnyExcept(0.0);
    }

    /// <summary>The residuals, those that are nothing but rounding set to zero, and upper bounds of their absolute values.</summary>
    private static void FindResiduals<TRows>(TRows rows, int[] states, double[] given, Refinement refinement)
        where TRows : struct, IRateRows
    {
        for (var k = 0; k < states.Length; k++)
        {
            var (residual, error) = rows.Differences(states[k], refinement.Highs, refinement.Lows).ResidualOf(given[k]);
            refinement.Residuals[k] = Math.Abs(residual) > error ? residual : 0;
            refinement.Bounds[k] = Math.Max(Upward.Add(Math.Abs(residual), error), SmallestBound);
        }
    }

    /// <summary>A bound on |z_i − h_i| / h_i over the states, with a substitution only where the ratios to the right-hand side are not enough.</summary>
    private static double LargestError<TFactors>(
        int[] states, double[] given, bool isTimes, Refinement refinement, TFactors factors, double solveError)
        where TFactors : IFactors
    {
        var bounds = refinement.Bounds;
        var ratio = isTimes ? LargestRatio(bounds, given) : double.PositiveInfinity;
        if (ratio <= EnoughByRatio || !factors.SolveRight(bounds))
        {
            return ratio;
        }

        var largest = 0.0;
        for (var k = 0; k < bounds.Length; k++)
        {
            if (refinement.Highs[states[k]] == 0)
            {
                continue; // a sum without subtraction is zero only where every term is: nothing given can be reached, and the exact entry is zero
            }

            var error = Upward.Divide(bounds[k], Upward.LowerDifference(1, solveError));
            var least = Upward.LowerDifference(refinement.Highs[states[k]] * (1 - (4 * Refinement.UnitRoundoff)), error);
            largest = least > 0 ? Math.Max(largest, Upward.Divide(error, least)) : double.PositiveInfinity;
        }

        return Math.Min(ratio, largest);
    }

    private static double LargestRatio(double[] bounds, double[] given)
    {
        var largest = 0.0;
        for (var k = 0; k < bounds.Length; k++)
        {
            largest = Math.Max(largest, Upward.Divide(bounds[k], given[k]));
        }

        return largest;
    }

    /// <summary>Writes the high parts; the bound counts the low parts that are dropped.</summary>
    private static double Rounded(ReadOnlySpan<int> states, Refinement refinement, int scale, Span<double> values)
    {
        foreach (var state in states)
        {
            if (refinement.BestHighs[state] != 0 && !double.IsNormal(Math.ScaleB(refinement.BestHighs[state], -scale)))
            {
                return double.PositiveInfinity;
            }
        }

        foreach (var state in states)
        {
            values[state] = Math.ScaleB(refinement.BestHighs[state], -scale);
        }

        return Upward.Add(
            refinement.Error,
            Upward.Multiply(Refinement.UnitRoundoff * (1 + (4 * Refinement.UnitRoundoff)), Upward.Add(1, refinement.Error)));
    }
}
