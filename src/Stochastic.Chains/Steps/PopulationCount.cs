using Stochastic.Chains.Internal;
using Stochastic.Chains.Kernels;

namespace Stochastic.Chains.Steps;

/// <summary>The law of a sum of independent yes-or-no items in groups of equal probability: a convolution of binomial laws.</summary>
internal static class PopulationCount
{
    /// <summary>The most items whose law is computed; its width grows with their square root, and the work with their number.</summary>
    internal const long MostItems = 10_000_000;

    internal static double Mean(List<PopulationGroup> groups)
    {
        var sum = default(CompensatedSum);
        groups.ForEach(group => sum.Add(group.Count * group.Probability));
        return sum.Value;
    }

    internal static double Variance(List<PopulationGroup> groups)
    {
        var sum = default(CompensatedSum);
        groups.ForEach(group => sum.Add(group.Count * group.Probability * (1 - group.Probability)));
        return sum.Value;
    }

    /// <exception cref="InvalidOperationException">There are too many items.</exception>
    internal static CountDistribution Of(List<PopulationGroup> groups, SolveOptions options)
    {
        var items = groups.Sum(group => group.Count);
        if (items > MostItems)
        {
            throw new InvalidOperationException(Messages.PopulationTooLarge(items, MostItems));
        }

        var law = new CountConvolution();
        var ofProbabilities = 0.0;
        foreach (var group in groups.OrderBy(group => group.Count))
        {
            options.CancellationToken.ThrowIfCancellationRequested();
            law.AddBinomial(group.Count, group.Probability);

            // Two binomial laws of n items differ by at most n times the difference of their probabilities, in any event.
            ofProbabilities += group.Count * (AbsoluteBound.From(group.RelativeErrorBound, group.Probability) + SmallestNormal);
        }

        var bound = law.AbsoluteErrorBound + (ofProbabilities * SubtractionFreeBound.SecondOrder);
        var isProof = options.CertificateLevel == CertificateLevel.Proof && double.IsFinite(bound);
        var probabilities = law.Probabilities.ToArray();
        return new CountDistribution(law.First, probabilities, Mean(groups), Variance(groups), new Certificate
        {
            Method = "convolution of binomial laws",
            Reason = "Each item is there or not, independently of the others; items with the same probability are one binomial law.",
            Residual = options.CertificateLevel >= CertificateLevel.Residual ? Math.Abs(CompensatedSum.Of(probabilities) - 1) : double.PositiveInfinity,
            AbsoluteErrorBound = isProof ? Math.Min(1, bound) : double.PositiveInfinity,
            Basis = isProof ? ErrorBasis.SubtractionFree : ErrorBasis.None,
            IsProof = isProof,
        });
    }

    private const double SmallestNormal = 2.2250738585072014e-308;
}
