using BenchmarkDotNet.Attributes;
using MathNet.Numerics.LinearAlgebra;

namespace Stochastic.Chains.Benchmarks.Estimation;

/// <summary>Counting one long path of observations: the whole call, which also finds the states, against counts in a matrix of MathNet.Numerics.</summary>
[MemoryDiagnoser]
public class CountingBenchmarks
{
    private const int States = 500;

    private int[] _path = [];

    /// <summary>The number of observations.</summary>
    [Params(10_000, 100_000, 1_000_000)]
    public int Events { get; set; }

    /// <summary>Makes the path once.</summary>
    [GlobalSetup]
    public void Setup()
    {
        _path = InventedChains.Path(Events, States);
        if (CountsInMatrix()[0, 1] != CountPath()[0, 1])
        {
            throw new InvalidOperationException("The two counts differ, so their times mean nothing.");
        }
    }

    /// <summary>What one would write with MathNet.Numerics alone, knowing the states beforehand.</summary>
    [Benchmark(Baseline = true)]
    public Matrix<double> CountsInMatrix()
    {
        var counts = Matrix<double>.Build.Dense(States, States);
        for (var k = 1; k < _path.Length; k++)
        {
            counts[_path[k - 1], _path[k]]++;
        }

        return counts;
    }

    /// <summary>The whole call.</summary>
    [Benchmark]
    public TransitionCounts<int> CountPath() => TransitionCounts.FromPath(_path);

    /// <summary>The whole call and the chain of maximum likelihood.</summary>
    [Benchmark]
    public Chain<int> CountPathToChain() => TransitionCounts.FromPath(_path).ToChain();
}
