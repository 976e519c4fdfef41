namespace Stochastic.Chains.Kernels;

/// <summary>A priori bounds on the relative error of what state reduction computes.</summary>
/// <remarks>
/// Let u = 2⁻⁵³. Eliminating state k of a table of N columns rounds each remaining rate by a relative amount of at most
/// (N − k + 3) u: N − k − 2 additions in the pivot, one quotient, one product and one addition, and the sum of relative errors of
/// non-negative terms is never more than the largest. So the computed table is the exact censored table of the table before it, up
/// to relative changes of that size. With r states left to go, an answer is a quotient of two sums of products of at most r + 1
/// rates (Markov chain tree theorem; matrix forest theorem), so it changes by at most 2 (r + 1) times as much (O'Cinneide 1993).
/// Substitution adds at most N − k + 3 roundings more for each state, and a final division by the sum of all at most 2 N + 4. Where
/// several moves were first merged into one column, each merge is one rounding of the data. All of it is summed and inflated for
/// second-order terms.
/// </remarks>
internal static class SubtractionFreeBound
{
    /// <summary>The factor that makes up for products of roundings.</summary>
    internal const double SecondOrder = 1.01;

    private const double UnitRoundoff = 1.1102230246251565e-16;
    private const double LargestFirstOrder = 0.01;

    /// <summary>
    /// The bound for an elimination of some states of a table of so many columns, with at most so many merges in an entry; infinite
    /// where it would say nothing.
    /// </summary>
    internal static double OfElimination(int pivots, int columns, int merges) => OfRoundings(RoundingsOfElimination(pivots, columns, merges));

    /// <summary>How many roundings, of one relative size, the error of an answer amounts to.</summary>
    internal static double RoundingsOfElimination(int pivots, int columns, int merges)
    {
        var roundings = (2.0 * (pivots + 1) * merges) + (2 * columns) + 4;
        for (var k = 0; k < pivots; k++)
        {
            roundings += ((2.0 * (pivots - k + 1)) + 1) * (columns - k + 3);
        }

        return roundings;
    }

    /// <summary>The bound for so many roundings one after the other: (1 + u)ⁿ − 1, inflated; infinite where it would exceed one hundredth.</summary>
    internal static double OfRoundings(double count)
    {
        var firstOrder = count * UnitRoundoff;
        return firstOrder <= LargestFirstOrder ? firstOrder * SecondOrder : double.PositiveInfinity;
    }
}
