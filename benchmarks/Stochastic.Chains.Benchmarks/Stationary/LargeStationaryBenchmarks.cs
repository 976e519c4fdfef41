using BenchmarkDotNet.Attributes;
using Stochastic.Chains.Kernels;

namespace Stochastic.Chains.Benchmarks.Stationary;

/// <summary>Long-run shares of full random chains so large that a decomposition by MathNet.Numerics takes seconds and is left out.</summary>
[MemoryDiagnoser]
public class LargeStationaryBenchmarks
{
    private static readonly SolveOptions WithoutEvidence = new() { CertificateLevel = CertificateLevel.None };
    private static readonly SolveOptions OnTwoThreads = WithoutEvidence with { Parallelism = 2 };
    private static readonly EliminationMethod Narrow = new() { Instructions = InstructionSet.Vector256 };

    private Chain<int> _chain = Chain.FromMatrix(new[,] { { 1.0 } });

    /// <summary>The number of states.</summary>
    [Params(2000, 3000)]
    public int States { get; set; }

    /// <summary>Makes the chain once.</summary>
    [GlobalSetup]
    public void Setup() => _chain = Chain.FromMatrix(InventedMatrices.Dense(States));

    /// <summary>State reduction without evidence.</summary>
    [Benchmark(Baseline = true)]
    public StationaryDistribution<int> StateReduction() => _chain.Stationary(WithoutEvidence);

    /// <summary>The same on two threads.</summary>
    [Benchmark]
    public StationaryDistribution<int> StateReductionOnTwoThreads() => _chain.Stationary(OnTwoThreads);

    /// <summary>The same with vectors of four doubles only.</summary>
    [Benchmark]
    public StationaryDistribution<int> StateReductionInNarrowVectors() => _chain.Stationary(Narrow, WithoutEvidence);

    /// <summary>State reduction with residual and proved bound: the default.</summary>
    [Benchmark]
    public StationaryDistribution<int> StateReductionWithProof() => _chain.Stationary();
}
