using BenchmarkDotNet.Attributes;
using MathNet.Numerics.LinearAlgebra;

namespace Stochastic.Chains.Benchmarks.Steps;

/// <summary>
/// The n-step matrix of a full random chain: the whole call by each method, without and with its proof, against the power of a matrix of
/// MathNet.Numerics.
/// </summary>
[MemoryDiagnoser]
public class NStepBenchmarks
{
    private static readonly SolveOptions WithoutEvidence = new() { CertificateLevel = CertificateLevel.None };

    private Chain<int> _chain = Chain.FromMatrix(new[,] { { 1.0 } });
    private Matrix<double> _matrix = Matrix<double>.Build.Dense(1, 1, 1);

    /// <summary>The number of states.</summary>
    [Params(10, 100, 500)]
    public int States { get; set; }

    /// <summary>The number of steps.</summary>
    [Params(2, 1000)]
    public int Steps { get; set; }

    /// <summary>Makes the inputs once, and sees that the powers agree.</summary>
    [GlobalSetup]
    public void Setup()
    {
        var probabilities = InventedMatrices.Dense(States);
        _chain = Chain.FromMatrix(probabilities);
        _matrix = Matrix<double>.Build.DenseOfArray(probabilities);
        var difference = (MathNetPower() - Squaring().ToMatrix()).Enumerate().Max(Math.Abs);
        if (difference > 1e-9)
        {
            throw new InvalidOperationException($"The two powers differ by {difference}, so their times mean nothing.");
        }
    }

    /// <summary>What one would write with MathNet.Numerics alone.</summary>
    [Benchmark(Baseline = true)]
    public Matrix<double> MathNetPower() => _matrix.Power(Steps);

    /// <summary>Squaring without evidence.</summary>
    [Benchmark]
    public NStepMatrix<int> Squaring() => _chain.NStep(Steps, new SquaringMethod(), WithoutEvidence);

    /// <summary>Squaring with residual and proved bound.</summary>
    [Benchmark]
    public NStepMatrix<int> SquaringWithProof() => _chain.NStep(Steps, new SquaringMethod());

    /// <summary>Each row step by step, without evidence.</summary>
    [Benchmark]
    public NStepMatrix<int> Propagation() => _chain.NStep(Steps, new PropagationMethod(), WithoutEvidence);

    /// <summary>One spectrum for one power, without evidence.</summary>
    [Benchmark]
    public NStepMatrix<int> Diagonalization() => _chain.NStep(Steps, new SpectralMethod(), WithoutEvidence);
}
