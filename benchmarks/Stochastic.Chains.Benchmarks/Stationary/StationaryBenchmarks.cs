using BenchmarkDotNet.Attributes;
using MathNet.Numerics.Providers.LinearAlgebra;

namespace Stochastic.Chains.Benchmarks.Stationary;

/// <summary>
/// Long-run shares of a full random chain: the whole call, without and with its proof, against what one would write with MathNet.Numerics
/// alone, the balance equations with the last one replaced by the sum, by its managed LU.
/// </summary>
[MemoryDiagnoser]
public class StationaryBenchmarks
{
    private static readonly SolveOptions WithoutEvidence = new() { CertificateLevel = CertificateLevel.None };
    private static readonly SolveOptions WithProof = new() { CertificateLevel = CertificateLevel.Proof };

    private double[,] _matrix = new double[0, 0];
    private Chain<int> _chain = Chain.FromMatrix(new[,] { { 1.0 } });
    private double[] _system = [];
    private double[] _shares = [];
    private int[] _pivots = [];

    /// <summary>The number of states.</summary>
    [Params(10, 100, 300)]
    public int States { get; set; }

    /// <summary>Makes the inputs once; buffers of the rival are pooled.</summary>
    [GlobalSetup]
    public void Setup()
    {
        _matrix = InventedMatrices.Dense(States);
        _chain = Chain.FromMatrix(_matrix);
        _system = new double[States * States];
        _shares = new double[States];
        _pivots = new int[States];
        var difference = LinearSystem().Zip(StateReduction().ToArray(), (first, second) => Math.Abs((first / second) - 1)).Max();
        if (difference > 1e-9)
        {
            throw new InvalidOperationException($"The two solves differ by {difference}, so their times mean nothing.");
        }
    }

    /// <summary>What one would write with MathNet.Numerics alone.</summary>
    [Benchmark(Baseline = true)]
    public double[] LinearSystem()
    {
        // Column-major: column "from" holds the balance of every state but the last, whose equation is the sum of all shares.
        for (var from = 0; from < States; from++)
        {
            for (var to = 0; to < States; to++)
            {
                _system[(from * States) + to] = to == States - 1 ? 1 : (to == from ? 1 : 0) - _matrix[from, to];
            }
        }

        Array.Clear(_shares);
        _shares[^1] = 1;
        var provider = ManagedLinearAlgebraProvider.Instance;
        provider.LUFactor(_system, States, _pivots);
        provider.LUSolveFactored(1, _system, States, _pivots, _shares);
        return _shares;
    }

    /// <summary>State reduction without evidence.</summary>
    [Benchmark]
    public StationaryDistribution<int> StateReduction() => _chain.Stationary(WithoutEvidence);

    /// <summary>State reduction with residual and proved bound: the default.</summary>
    [Benchmark]
    public StationaryDistribution<int> StateReductionWithProof() => _chain.Stationary(WithProof);
}
