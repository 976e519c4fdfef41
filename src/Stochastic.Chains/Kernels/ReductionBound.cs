namespace Stochastic.Chains.Kernels;

/// <summary>
/// The a priori entrywise bound of <see cref="StateReduction"/> followed by <see cref="ReductionSolve.Stationary"/>, as built here.
/// </summary>
/// <remarks>
/// If every elimination of a state leaves entries within factors [(1 - u)^d, (1 - u)^-d] of the exact elimination of the table before it, each
/// ratio of stationary probabilities moves by at most (1 - u)^±2(m - 1)d, m states remaining: by the Markov chain tree theorem it is a ratio
/// of sums of products of m - 1 rates (perturbation result: O'Cinneide 1993). The constants count roundings per eliminated state for the
/// block, band and step forms together, with two roundings per multiply-add, for nothing promises that it is fused.
/// </remarks>
internal static class ReductionBound
{
    private const double UnitRoundoff = 1.0 / (1L << 53);

    private const double AddCost = 2;
    private const double Band = 8;

    /// <summary>A bound on the relative error of every stationary probability of so many states; +∞ where it would say nothing.</summary>
    internal static double OfStationary(int states)
    {
        var others = states - 1.0;
        return OfRoundings((others * (others - 1) * PerState(states)) + (others * PerFactor(states)) + (2 * AddCost * others) + (states / 4.0) + 5);
    }

    /// <summary>
    /// A bound on the relative error of every entry of a solution of a system with exits, whose right-hand side is non-negative; +∞ where
    /// it would say nothing. An entry is a ratio of sums of products of at most as many rates as there are pivots (matrix forest theorem);
    /// the right-hand side is carried along like one more exit column, and substitution is one more sum for each state. Several moves merged
    /// into one entry beforehand are roundings of the data.
    /// </summary>
    internal static double OfSystem(int pivots, int columns, int merges)
    {
        var substitution = (columns / 4.0) + AddCost + 6;
        return OfRoundings(
            (pivots * (pivots + 1.0) * PerState(columns)) + (pivots * (PerFactor(columns) + AddCost + substitution)) + (2 * AddCost * pivots) +
            (2.0 * (pivots + 1) * merges) + substitution);
    }

    private static double PerState(int columns)
    {
        var sum = (columns / 4.0) + 6;
        return IsBlocked(columns)
            ? sum + (3 * AddCost * WidestBlock) + (WidestBlock / 4) + (((3 * AddCost) + 1) * Band) + (14 * AddCost) + 21
            : sum + (AddCost * (Band + 6)) + 8;
    }

    private static double PerFactor(int columns) => PerState(columns) + (((4 * AddCost) + 1) * (IsBlocked(columns) ? WidestBlock : Band)) + 3;

    private static bool IsBlocked(int columns) => columns >= BlockReduction<TileKernel512>.SmallestTable;

    private static double WidestBlock => BlockReduction<TileKernel512>.WidestBlock;

    /// <summary>The bound for so many roundings one after the other, each a factor from 1 - u to 1 / (1 - u); +∞ where it would say nothing.</summary>
    internal static double OfRoundings(double roundings)
    {
        var error = roundings * UnitRoundoff;
        return error < 0.5 ? error / (1 - (2 * error)) : double.PositiveInfinity;
    }
}
