using BenchmarkDotNet.Attributes;
using MathNet.Numerics.LinearAlgebra;

namespace Stochastic.Chains.Benchmarks.LongRun;

/// <summary>
/// The long run of a full random chain with two absorbing ends: the whole call, with its proof, against the fundamental matrix by the managed
/// inverse of MathNet.Numerics.
/// </summary>
[MemoryDiagnoser]
public class LongRunBenchmarks
{
    private const int Ends = 2;

    private Chain<int> _chain = Chain.FromMatrix(new[,] { { 1.0 } });
    private Matrix<double> _matrix = Matrix<double>.Build.Dense(1, 1);

    /// <summary>The number of states.</summary>
    [Params(10, 100, 300)]
    public int States { get; set; }

    /// <summary>Makes the inputs once.</summary>
    [GlobalSetup]
    public void Setup()
    {
        var table = InventedMatrices.Dense(States);
        for (var end = 0; end < Ends; end++)
        {
            for (var to = 0; to < States; to++)
            {
                table[end, to] = end == to ? 1 : 0;
            }
        }

        _chain = Chain.FromMatrix(table);
        _matrix = Matrix<double>.Build.DenseOfArray(table);
        var difference = Math.Abs(FundamentalMatrix()[0, 0] - LongRun()[Ends, 0]);
        if (difference > 1e-9)
        {
            throw new InvalidOperationException($"The two answers differ by {difference}, so their times mean nothing.");
        }
    }

    /// <summary>What one would write with MathNet.Numerics alone.</summary>
    [Benchmark(Baseline = true)]
    public Matrix<double> FundamentalMatrix()
    {
        var transient = States - Ends;
        var among = _matrix.SubMatrix(Ends, transient, Ends, transient);
        return (Matrix<double>.Build.DenseIdentity(transient) - among).Inverse() * _matrix.SubMatrix(Ends, transient, 0, Ends);
    }

    /// <summary>Probabilities of the ends and shares inside them, with a proved bound.</summary>
    [Benchmark]
    public LongRunMatrix<int> LongRun() => _chain.LongRun();
}
