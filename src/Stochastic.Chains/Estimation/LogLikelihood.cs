namespace Stochastic.Chains.Estimation;

/// <summary>The share of one move in the largest log-likelihood.</summary>
internal static class LogLikelihood
{
    /// <summary>count · ln(count / total), 0 for a count of 0.</summary>
    internal static double Of(long count, long total) => count == 0 ? 0 : count * Math.Log(ExactRatio.Of(count, total));
}
