namespace Stochastic.Chains.Kernels;

/// <summary>
/// Tables of rates in which every state moves to every other one: a look at the table alone tells that <see cref="FirstPassageReduction"/>
/// keeps to the normal range of doubles, and no product has to be looked at.
/// </summary>
/// <remarks>
/// Let δ be the least rate, ρ the largest outflow and γ the least holding time. Eliminating states only adds to the rates and holding times
/// that remain, and never raises an outflow. So every rate stays at least δ and every pivot at most ρ; a factor is at least δ/ρ, an entry of N at
/// least min(1, δ/ρ)/ρ, of W at least δ/ρ, of w and of the times at least γ/ρ. With δ ≥ 2⁻²⁰⁰, γ ≥ 2⁻²⁰⁰ and ρ ≤ 2²⁰⁰ each of these is at
/// least 2⁻⁶⁰⁰, and each product of two that is formed, of a rate, factor or weight with any of them, at least 2⁻⁸⁰⁰. That leaves far more room than
/// roundings take.
/// </remarks>
internal static class FullRates
{
    private const double Least = 6.223015277861142E-61;
    private const double Most = 1.6069380442589903E+60;

    /// <summary>Whether the rates off the diagonal and the holding times behind them are positive and far from the ends of the range.</summary>
    internal static bool KeepProducts(MatrixView rates, int states)
    {
        for (var row = 0; row < states; row++)
        {
            var before = rates.Row(row, 0, row);
            var after = rates.Row(row, row + 1, states - row);
            if (!(NormalRange.Least(before) >= Least && NormalRange.Least(after) >= Least)
                || !(Math.Max(NormalRange.Extent(before).Largest, NormalRange.Extent(after).Largest) * states <= Most))
            {
                return false;
            }
        }

        return true;
    }
}
