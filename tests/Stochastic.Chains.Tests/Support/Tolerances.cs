namespace Stochastic.Chains.Tests.Support;

/// <summary>The one place that says how close is close enough, and why. Tests name a tolerance from here; they do not make up numbers.</summary>
internal static class Tolerances
{
    /// <summary>The largest relative error of one rounding of a double: u = 2⁻⁵³.</summary>
    internal const double UnitRoundoff = 1.1102230246251565e-16;

    /// <summary>What a refined or doubled direct solve proves: four roundings.</summary>
    internal const double FourRoundings = 4 * UnitRoundoff;

    /// <summary>
    /// What a figure recomputed exactly from a published case may differ by, relative to itself, where the case suggests no tolerance of
    /// its own: what nearly all of them suggest for code that avoids subtraction.
    /// </summary>
    internal const double Published = 1e-12;

    /// <summary>
    /// The relative error of each entry that a direct method without subtraction may make over so many states: 4·n·u. It is what such a
    /// method reaches in practice; its proved bound grows with n³ (O'Cinneide 1993) and is checked against exact answers by itself.
    /// </summary>
    internal static double SubtractionFree(int states) => 4 * states * UnitRoundoff;

    /// <summary>
    /// What long-run shares may change by when the probabilities of a published case are rounded to doubles, relative to each: at most two
    /// roundings of each (a rate, and its quotient by the rate of the steps), and a share of n states is a quotient of two sums of products of n − 1 of
    /// them (Markov chain tree theorem; O'Cinneide 1993), with a little for second-order terms.
    /// </summary>
    internal static double RoundedInput(int states) => 4.01 * states * UnitRoundoff;

    /// <summary>
    /// The relative error of each entry after so many steps, each adding up at most so many moves into a state: one rounding for each
    /// addition, and eight more for the product, the stay and the division of the row by its sum.
    /// </summary>
    internal static double Steps(long steps, int largestIndegree) => steps * (largestIndegree + 8.0) * UnitRoundoff;

    /// <summary>The absolute rounding of adding up so many terms that sum to one.</summary>
    internal static double SumOfOne(int terms) => terms * UnitRoundoff;

    /// <summary>Half a unit in the last place that a source printed, for checks against its printed digits.</summary>
    internal static double PrintedDigits(int decimals) => 0.5 * Math.Pow(10, -decimals);

    /// <summary>What the incomplete beta function of MathNet.Numerics 5.0 keeps for a hundred thousand trials; at ten million it is off by 4e-9.</summary>
    internal const double IncompleteBeta = 1e-9;

    /// <summary>What is proved about the law of a count of ten million: the number of items times the error of their probability after a few steps.</summary>
    internal const double CountsOfMillions = 1e-7;
}
