using Stochastic.Chains;

namespace CratePool.Report;

/// <summary>The certificates of the answers given so far, and how the answers are computed.</summary>
internal sealed class Evidence(SolveOptions options)
{
    private readonly List<(string Answer, Certificate Certificate)> _certificates = [];

    internal SolveOptions Options => options;

    internal IReadOnlyList<(string Answer, Certificate Certificate)> Certificates => _certificates;

    internal void Add(string answer, Certificate certificate) => _certificates.Add((answer, certificate));
}
