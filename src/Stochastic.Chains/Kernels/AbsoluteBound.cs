namespace Stochastic.Chains.Kernels;

/// <summary>What a bound on relative errors says about absolute ones.</summary>
internal static class AbsoluteBound
{
    /// <summary>
    /// With |z − x| at most ε x for the true x, x is at most z / (1 − ε), so |z − x| is at most ε z / (1 − ε), rounded up; +∞ when ε is 1
    /// or more.
    /// </summary>
    internal static double From(double relative, double largest) => relative < 1
        ? Upward.Multiply(Upward.Divide(relative, Upward.LowerDifference(1, relative)), largest)
        : double.PositiveInfinity;
}
