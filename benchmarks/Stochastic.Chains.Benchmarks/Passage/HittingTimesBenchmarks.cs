using BenchmarkDotNet.Attributes;
using MathNet.Numerics.LinearAlgebra;

namespace Stochastic.Chains.Benchmarks.Passage;

/// <summary>
/// Mean times to one target of a full random chain, the whole call, against the long-run shares of the same chain (one elimination) and what one would write with
/// MathNet.Numerics alone: (I − Q) h = 1 by its managed LU.
/// </summary>
[MemoryDiagnoser]
public class HittingTimesBenchmarks
{
    private static readonly SolveOptions WithoutEvidence = new() { CertificateLevel = CertificateLevel.None };

    private double[,] _matrix = new double[0, 0];
    private Chain<int> _chain = Chain.FromMatrix(new[,] { { 1.0 } });

    /// <summary>The number of states.</summary>
    [Params(100, 500)]
    public int States { get; set; }

    /// <summary>Makes the inputs once.</summary>
    [GlobalSetup]
    public void Setup()
    {
        _matrix = InventedMatrices.Dense(States);
        _chain = Chain.FromMatrix(_matrix);
        var difference = LinearSystem().Zip(HittingTimes().Values.ToArray(), (first, second) => Math.Abs((first / second) - 1)).Max();
        if (difference > 1e-9)
        {
            throw new InvalidOperationException($"The two solves differ by {difference}, so their times mean nothing.");
        }
    }

    /// <summary>What one would write with MathNet.Numerics alone.</summary>
    [Benchmark(Baseline = true)]
    public double[] LinearSystem()
    {
        var system = Matrix<double>.Build.Dense(States - 1, States - 1, (row, column) => (row == column ? 1 : 0) - _matrix[row, column]);
        return system.Solve(Vector<double>.Build.Dense(States - 1, 1)).ToArray();
    }

    /// <summary>Long-run shares without evidence: one elimination.</summary>
    [Benchmark]
    public StationaryDistribution<int> OneElimination() => _chain.Stationary(WithoutEvidence);

    /// <summary>Mean times without evidence.</summary>
    [Benchmark]
    public HittingTimes<int> HittingTimes() => _chain.TimeTo(States - 1, WithoutEvidence);

    /// <summary>Mean times with their proof: the default.</summary>
    [Benchmark]
    public HittingTimes<int> HittingTimesWithProof() => _chain.TimeTo(States - 1);

    /// <summary>Standard deviations of those times.</summary>
    [Benchmark]
    public PassageMoments<int> Deviations() => HittingTimes().Moments(WithoutEvidence);
}
