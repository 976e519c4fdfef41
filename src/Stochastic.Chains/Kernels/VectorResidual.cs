namespace Stochastic.Chains.Kernels;

/// <summary>How far a positive vector x is from the balance of a stationary distribution π of one recurrent class, and what that says about its error.</summary>
/// <param name="Imbalance">An upper bound of Σ |inflow − outflow| over the states, which is the 1-norm of x (I − P).</param>
/// <param name="Deviation">An upper bound of |Σ x − 1|.</param>
internal readonly record struct VectorResidual(double Imbalance, double Deviation)
{
    private const int ScaledExponent = 900;

    /// <summary>The residual of a vector given by state; infinite where a number leaves the range of a double.</summary>
    internal static VectorResidual Of<TRows>(TRows rows, ReadOnlySpan<int> states, ReadOnlySpan<double> values)
        where TRows : struct, IRateRows
    {
        if (!ScaledWeights.TryScale(states, values, ScaledExponent, out var weights, out var scale))
        {
            return new VectorResidual(double.PositiveInfinity, double.PositiveInfinity);
        }

        var bounds = new double[states.Length];
        new StateFlows<TRows>(rows, states).FindImbalances(weights, new double[weights.Length], new double[states.Length], bounds);
        var sum = 0.0;
        foreach (var bound in bounds)
        {
            sum = Upward.Add(sum, bound);
        }

        return new VectorResidual(Math.BitIncrement(Math.ScaleB(sum, -scale)), ScaledWeights.DeviationFromOne(states, values));
    }

    /// <summary>
    /// The bound on Σ |x_i − π_i|, and so on each entry, when an error of sum zero is at most so many times the residual that it leaves:
    /// the residual of x / Σx times that, and what x misses of x / Σx; +∞ where nothing is known.
    /// </summary>
    internal double ErrorBound(double amplification) => amplification < double.PositiveInfinity && Imbalance < double.PositiveInfinity && Deviation < 1
        ? Upward.Add(Deviation, Upward.Divide(Upward.Multiply(Imbalance, amplification), Upward.LowerDifference(1, Deviation)))
        : double.PositiveInfinity;
}
