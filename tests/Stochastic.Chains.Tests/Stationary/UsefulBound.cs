using Stochastic.Chains.Tests.Support;

namespace Stochastic.Chains.Tests.Stationary;

/// <summary>What a bound has to be to be of use: not far above the error that was really made.</summary>
internal static class UsefulBound
{
    /// <summary>
    /// At most four roundings, or ten thousand times the error and a rounding. In the families that the page about certificates lists, whose
    /// flows lie far apart or go round in circles, balancing the flows proves less; the factor is then a million. No bound at all only for shares
    /// of which less than two digits are right.
    /// </summary>
    internal static double For(string family, double error) => error > FewDigits
        ? double.PositiveInfinity
        : Math.Max(Tolerances.FourRoundings, (Listed.Contains(family) ? ListedFactor : Factor) * (error + Tolerances.UnitRoundoff));

    private const double FewDigits = 0.01;
    private const double Factor = 1e4;
    private const double ListedFactor = 1e6;

    private static readonly HashSet<string> Listed = ["nearly decomposable", "nested decomposable", "periodic"];
}
