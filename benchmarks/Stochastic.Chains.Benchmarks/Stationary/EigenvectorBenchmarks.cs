using BenchmarkDotNet.Attributes;

namespace Stochastic.Chains.Benchmarks.Stationary;

/// <summary>Long-run shares as an eigenvector: MathNet.Numerics' decomposition, the eigen method of the library, and state reduction.</summary>
public class EigenvectorBenchmarks
{
    private static readonly SolveOptions WithoutEvidence = new() { CertificateLevel = CertificateLevel.None };
    private static readonly EigenMethod Eigenvector = new();

    private BalanceEquations _equations = new(new double[0, 0]);
    private Chain<int> _chain = Chain.FromMatrix(new[,] { { 1.0 } });

    /// <summary>The number of states; MathNet.Numerics' decomposition grows beyond patience after that.</summary>
    [Params(100, 500)]
    public int States { get; set; }

    /// <summary>Makes the inputs once.</summary>
    [GlobalSetup]
    public void Setup()
    {
        var matrix = InventedMatrices.Dense(States);
        _chain = Chain.FromMatrix(matrix);
        _equations = new BalanceEquations(matrix);
        BalanceEquations.RequireAgreement(Decomposition(), StateReduction().ToArray());
    }

    /// <summary>What one would write with MathNet.Numerics alone.</summary>
    [Benchmark(Baseline = true)]
    public double[] Decomposition() => _equations.ByEigenvector();

    /// <summary>The eigen method of the library, without evidence.</summary>
    [Benchmark]
    public StationaryDistribution<int> EigenMethod() => _chain.Stationary(Eigenvector, WithoutEvidence);

    /// <summary>State reduction without evidence.</summary>
    [Benchmark]
    public StationaryDistribution<int> StateReduction() => _chain.Stationary(WithoutEvidence);
}
