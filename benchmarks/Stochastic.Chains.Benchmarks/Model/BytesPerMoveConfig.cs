using BenchmarkDotNet.Configs;

namespace Stochastic.Chains.Benchmarks.Model;

/// <summary>Adds the column of bytes allocated for each move.</summary>
public sealed class BytesPerMoveConfig : ManualConfig
{
    /// <summary>Makes the configuration.</summary>
    public BytesPerMoveConfig() => AddColumn(new BytesPerMoveColumn());
}
