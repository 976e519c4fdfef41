namespace Stochastic.Chains.Kernels;

/// <summary>How far a solution may be from the truth when its refinement begins.</summary>
/// <param name="MostSteps">The most corrections that are made.</param>
/// <param name="LargestFirstCorrection">The largest first correction of an entry, relative to itself.</param>
internal readonly record struct RefinementReach(int MostSteps, double LargestFirstCorrection)
{
    /// <summary>The largest later correction: larger ones show that refinement does not contract.</summary>
    internal const double LargestCorrection = 1.0 / 16;

    /// <summary>Where elimination has left off: all but the last digits are right.</summary>
    internal static RefinementReach LastDigits => new(3, LargestCorrection);

    /// <summary>Anywhere: the first correction is a solve of its own.</summary>
    internal static RefinementReach Anywhere => new(8, double.PositiveInfinity);
}
