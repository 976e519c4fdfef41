namespace Stochastic.Chains.Kernels;

/// <summary>Bounds in the 1-norm on the error of a stationary vector from its residual and a number that says how fast errors die out.</summary>
/// <remarks>
/// With r = x (I − P) and e = x − π, both of sum zero, e = r + e P. If all rows of P have mass Σ_j m_j in common (m_j ≤ p_ij for all i; Doeblin),
/// then e P = e (P − 1 mᵀ) with a non-negative matrix of row sums 1 − Σ m, so ‖e‖₁ ≤ ‖r‖₁ / Σ m. A random walk with restart has the restart
/// probability in common. The vector is taken as x / Σx; what its sum misses of one is added.
/// </remarks>
internal static class Contraction
{
    private const int ScaledExponent = 900;

    /// <summary>A lower bound of the mass that all rows of a class have in common; zero for most sparse chains.</summary>
    internal static double SharedMass<TRows>(TRows rows, ReadOnlySpan<int> states)
        where TRows : struct, IRateRows
    {
        var least = new double[rows.Count];
        var present = new int[rows.Count];
        Array.Fill(least, double.PositiveInfinity);
        foreach (var state in states)
        {
            var outflow = 0.0;
            var rates = rows.Rates(state);
            for (var position = 0; position < rates.Length; position++)
            {
                var column = rows.Column(state, position);
                if (column != state && rates[position] != 0)
                {
                    outflow = Upward.Add(outflow, rates[position]);
                    least[column] = Math.Min(least[column], rates[position]);
                    present[column]++;
                }
            }

            least[state] = Math.Min(least[state], Upward.LowerDifference(1, outflow));
            present[state]++;
        }

        var mass = 0.0;
        foreach (var state in states)
        {
            mass = Math.BitDecrement(mass + (present[state] == states.Length ? least[state] : Math.Min(0, least[state])));
        }

        return mass;
    }

    /// <summary>
    /// The bound on Σ |x_i − π_i| when an error of sum zero is at most so many times the residual that it leaves: 1 / Σm, for example.
    /// </summary>
    internal static double AbsoluteErrorBound<TRows>(TRows rows, ReadOnlySpan<int> states, ReadOnlySpan<double> values, double amplification)
        where TRows : struct, IRateRows
    {
        if (!(amplification >= 0) || !ScaledWeights.TryScale(states, values, ScaledExponent, out var weights, out var scale))
        {
            return double.PositiveInfinity;
        }

        var bounds = new double[states.Length];
        new StateFlows<TRows>(rows, states).FindImbalances(weights, new double[weights.Length], new double[states.Length], bounds);
        var residual = 0.0;
        foreach (var bound in bounds)
        {
            residual = Upward.Add(residual, Math.ScaleB(bound, -scale));
        }

        var deviation = ScaledWeights.DeviationFromOne(states, values);
        return deviation < 1
            ? Upward.Add(deviation, Upward.Divide(Upward.Multiply(residual, amplification), Upward.LowerDifference(1, deviation)))
            : double.PositiveInfinity;
    }
}
