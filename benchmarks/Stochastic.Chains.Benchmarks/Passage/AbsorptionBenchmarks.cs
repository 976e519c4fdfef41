using BenchmarkDotNet.Attributes;
using MathNet.Numerics.LinearAlgebra;

namespace Stochastic.Chains.Benchmarks.Passage;

/// <summary>
/// Where things end: ten closed classes behind a full random transient part, against what one would write with MathNet.Numerics alone, and one
/// elimination of a chain of that size.
/// </summary>
[MemoryDiagnoser]
public class AbsorptionBenchmarks
{
    private const int Ends = 10;

    private static readonly SolveOptions WithoutEvidence = new() { CertificateLevel = CertificateLevel.None };

    private Chain<int> _full = Chain.FromMatrix(new[,] { { 1.0 } });
    private Matrix<double> _matrix = Matrix<double>.Build.Dense(1, 1);
    private Chain<int> _ending = Chain.FromMatrix(new[,] { { 1.0 } });

    /// <summary>The number of states.</summary>
    [Params(100, 500)]
    public int States { get; set; }

    /// <summary>Makes the inputs once.</summary>
    [GlobalSetup]
    public void Setup()
    {
        _full = Chain.FromMatrix(InventedMatrices.Dense(States));
        var ending = InventedMatrices.WithEnds(States, Ends);
        _ending = Chain.FromMatrix(ending);
        _matrix = Matrix<double>.Build.DenseOfArray(ending);
        var difference = Math.Abs((LinearSystem()[0, 0] / Absorption().Values[0]) - 1);
        if (difference > 1e-9)
        {
            throw new InvalidOperationException($"The two answers differ by {difference}, so their times mean nothing.");
        }
    }

    /// <summary>What one would write with MathNet.Numerics alone: probabilities of the ends, and mean steps in the last column.</summary>
    [Benchmark(Baseline = true)]
    public Matrix<double> LinearSystem()
    {
        var inside = States - Ends;
        var right = _matrix.SubMatrix(0, inside, inside, Ends).Append(Matrix<double>.Build.Dense(inside, 1, 1));
        return (Matrix<double>.Build.DenseIdentity(inside) - _matrix.SubMatrix(0, inside, 0, inside)).Solve(right);
    }

    /// <summary>One elimination.</summary>
    [Benchmark]
    public StationaryDistribution<int> OneElimination() => _full.Stationary(WithoutEvidence);

    /// <summary>Probabilities of all ends and mean steps.</summary>
    [Benchmark]
    public Absorption<int> Absorption() => _ending.Absorption(WithoutEvidence);
}
