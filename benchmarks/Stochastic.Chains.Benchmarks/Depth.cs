namespace Stochastic.Chains.Benchmarks;

/// <summary>How much is measured by BenchmarkDotNet.</summary>
internal enum Depth
{
    /// <summary>Smaller sizes, few iterations.</summary>
    Quick,

    /// <summary>All sizes.</summary>
    Full,
}
