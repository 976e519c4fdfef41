namespace Stochastic.Chains.Kernels;

/// <summary>
/// The a priori entrywise bounds of <see cref="FirstPassageReduction"/> and <see cref="GeneralFirstPassage{TNumber}"/>, as built here.
/// </summary>
/// <remarks>
/// All errors are counted in roundings: a count e stands for factors from (1 − u)^e to (1 − u)^−e, u = 2⁻⁵³. Sums of non-negative numbers
/// keep the largest count of their terms, products and quotients add counts.
///
/// Sensitivity. Among r states, h_ij is a quotient of two sums of products (all minors matrix tree theorem): r − 2 rates and a holding time
/// above, r − 1 rates below. Changing each rate and holding time by δ changes it by at most 2(r − 1)δ. When ρ states remain to be
/// eliminated before others, an entry of W, or w, is in the same way a quotient of ρ + 1 factors and ρ, taken as the row of an observer
/// that moves to one of them only; it changes by at most (2ρ + 1)δ.
///
/// Eliminating R before L with computed Ŵ, ŵ in exact products for all other rows leaves the same table as this sequence: eliminate some
/// states of R exactly, change each entry of the table that remains by at most δ, and so on; the δ are as follows.
/// (1) In a base block of m states with q columns to the right, in-block entries and the sum of the rest are computed once for each
/// state: the pivot of a state is off by the m additions, the 2m of what was added to the rest, and the σ of the sum of the rest; a factor by one
/// more, an added product by two more: δ = 3m + σ + 3 for each state. N from these factors is a sum of products, computed row after
/// row in each of two triangles: at most m² + 2m. N times the right columns: g(m).
/// (2) Where R is cut in two, R₁ first: the sequence of R₁; the rows of R₂ are then rounded by g(|R₁|), a change of the table without R₁;
/// the sequence of R₂; Ŵ of R₁ is at last rounded by g(|R₂|), which is a change of the table without R for whoever moves to R₁.
///
/// So H_LL of the computed table among L is off by the sum of 2(r − 1)δ, and g for the table among L itself; Ŵ and ŵ by the sum of
/// (2ρ + 1)δ; H_RL by both, the error of the times among L in their own recursion, and g(|L|). (Perturbation argument: O'Cinneide 1993.)
/// </remarks>
internal static class FirstPassageBound
{
    /// <summary>
    /// A bound on the relative error of each mean time between <paramref name="states"/> states of which the first
    /// <paramref name="kept"/> are targets, by <see cref="FirstPassageReduction"/>; in roundings.
    /// </summary>
    internal static double Roundings(int states, int kept) => kept < states ? OfSplit(kept, states - kept) : OfTable(states);

    /// <summary>The same for <see cref="GeneralFirstPassage{TNumber}"/>.</summary>
    internal static double RoundingsOfGeneral(int states, int kept) => kept < states ? OfGeneralSplit(kept, states - kept) : OfGeneralTable(states);

    private static double OfTable(int states)
    {
        var first = PassageElimination.Half(states);
        return states <= 1 ? 0 : Math.Max(OfSplit(first, states - first), OfSplit(states - first, first));
    }

    private static double OfSplit(int kept, int dropped) =>
        OfTable(kept) + OfElimination(dropped, kept, kept) + (2 * kept * GuardedProduct.Roundings(dropped)) + GuardedProduct.Roundings(kept);

    /// <summary>The sum of all changes in the elimination of some states before others, weighted with the sensitivity of the answer.</summary>
    /// <param name="states">The states to eliminate.</param>
    /// <param name="others">The columns right of them.</param>
    /// <param name="kept">How many of the others are kept in the end.</param>
    private static double OfElimination(int states, int others, int kept)
    {
        if (states <= PassageElimination.LargestBase)
        {
            var sum = (Math.Min(others, PassageElimination.SumChunk) / 4.0) + 3 + Math.Ceiling((double)others / PassageElimination.SumChunk);
            var changes = (states * ((3 * states) + sum + 3)) + (states * (states + 2)) + GuardedProduct.Roundings(states);
            return changes * Sensitivity(states + others, kept);
        }

        var first = PassageElimination.Half(states);
        var second = states - first;
        return OfElimination(first, second + others, kept)
            + (GuardedProduct.Roundings(first) * Sensitivity(second + others, kept))
            + OfElimination(second, others, kept)
            + (GuardedProduct.Roundings(second) * Sensitivity(others, kept));
    }

    /// <summary>What a change of the table over so many remaining states does to a time from an eliminated to a kept state.</summary>
    private static double Sensitivity(int remaining, int kept) => (2.0 * (remaining - 1)) + (2.0 * (remaining - kept)) + 1;

    private static double OfGeneralTable(int states) =>
        states <= 1 ? 0 : Math.Max(OfGeneralSplit(states / 2, states - (states / 2)), OfGeneralSplit(states - (states / 2), states / 2));

    /// <summary>State by state: each pivot is the sum of all that remains of its row; substitution is one base block as wide as all of them.</summary>
    private static double OfGeneralSplit(int kept, int dropped)
    {
        var states = kept + dropped;
        var changes = 0.0;
        for (var eliminated = 0; eliminated < dropped; eliminated++)
        {
            changes += (states - eliminated + 3) * Sensitivity(states - eliminated, kept);
        }

        var substitution = (dropped * (dropped + 2.0)) * Sensitivity(kept, kept);
        return OfGeneralTable(kept) + changes + substitution + (2.0 * kept * (dropped + 2)) + kept + 2;
    }
}
