using BenchmarkDotNet.Attributes;
using Stochastic.Chains.Kernels;

namespace Stochastic.Chains.Benchmarks.Stationary;

/// <summary>
/// Long-run shares of a full random chain: the whole call, without and with its proof, on one thread and two, with vectors of four doubles only,
/// against what one would write with MathNet.Numerics alone.
/// </summary>
[MemoryDiagnoser]
public class StationaryBenchmarks
{
    private static readonly SolveOptions WithoutEvidence = new() { CertificateLevel = CertificateLevel.None };
    private static readonly SolveOptions OnTwoThreads = WithoutEvidence with { Parallelism = 2 };
    private static readonly EliminationMethod Narrow = new() { Instructions = InstructionSet.Vector256 };

    private BalanceEquations _equations = new(new double[0, 0]);
    private Chain<int> _chain = Chain.FromMatrix(new[,] { { 1.0 } });

    /// <summary>The number of states.</summary>
    [Params(10, 100, 500, 1000)]
    public int States { get; set; }

    /// <summary>Makes the inputs once.</summary>
    [GlobalSetup]
    public void Setup()
    {
        var matrix = InventedMatrices.Dense(States);
        _chain = Chain.FromMatrix(matrix);
        _equations = new BalanceEquations(matrix);
        BalanceEquations.RequireAgreement(LinearSystem(), StateReduction().ToArray());
    }

    /// <summary>What one would write with MathNet.Numerics alone.</summary>
    [Benchmark(Baseline = true)]
    public double[] LinearSystem() => _equations.ByDecomposition();

    /// <summary>State reduction without evidence.</summary>
    [Benchmark]
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
