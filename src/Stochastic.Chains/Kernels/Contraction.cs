namespace Stochastic.Chains.Kernels;

/// <summary>How many times its residual the error of a stationary vector can be: one over the mass that all rows have in common.</summary>
/// <remarks>
/// With r = x (I − P) and e = x − π, both of sum zero, e = r + e P. If all rows of P have mass Σ_j m_j in common (m_j ≤ p_ij for all i; Doeblin),
/// then e P = e (P − 1 mᵀ) with a non-negative matrix of row sums 1 − Σ m, so ‖e‖₁ ≤ ‖r‖₁ / Σ m. A random walk with restart has the restart
/// probability in common.
/// </remarks>
internal static class Contraction
{
    /// <summary>One over the mass that all rows of a class have in common; +∞ when there is none.</summary>
    internal static double Amplification<TRows>(TRows rows, ReadOnlySpan<int> states)
        where TRows : struct, IRateRows
    {
        var mass = SharedMass(rows, states);
        return mass > 0 ? Upward.Divide(1, mass) : double.PositiveInfinity;
    }

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
}
