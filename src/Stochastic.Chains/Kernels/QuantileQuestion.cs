namespace Stochastic.Chains.Kernels;

/// <summary>
/// With what probability something is to have arrived. Where arriving is certain, at least one half is asked of those still on the way, which are added
/// up by themselves: 1 − p is exact there, and a share close to one keeps its digits.
/// </summary>
/// <param name="Probability">Above 0 and below 1.</param>
/// <param name="Ever">The probability of ever arriving.</param>
/// <param name="IsCertain">Whether arriving is certain by the possible moves alone.</param>
internal readonly record struct QuantileQuestion(double Probability, double Ever, bool IsCertain)
{
    private const double Rounding = 8.8817841970012523e-16;

    /// <summary>Whether the probability cannot be told from that of ever arriving.</summary>
    internal bool IsLimit => !IsCertain && Math.Abs(Probability - Ever) <= Rounding * Ever;

    /// <summary>Whether more is asked than ever arrives.</summary>
    internal bool IsBeyond => !IsCertain && !IsLimit && Probability > Ever;

    /// <summary>Whether the share has arrived.</summary>
    internal bool IsReached(double arrived, double onTheWay) =>
        IsCertain && Probability >= 0.5 ? onTheWay <= 1 - Probability
        : IsLimit ? onTheWay == 0
        : arrived >= Probability;
}
