namespace Stochastic.Chains.Benchmarks.Ratios;

/// <summary>Everything that is held against general-purpose libraries, with the ratio that is aimed at where one is set.</summary>
internal static class Comparisons
{
    internal static readonly SolveOptions WithoutEvidence = new() { CertificateLevel = CertificateLevel.None };

    internal static IReadOnlyList<Comparison> All { get; } = [.. DenseComparisons.All, .. SparseComparisons.All, .. StreamComparisons.All];
}
