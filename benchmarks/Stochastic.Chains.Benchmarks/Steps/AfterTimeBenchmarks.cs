using BenchmarkDotNet.Attributes;
using MathNet.Numerics.LinearAlgebra;

namespace Stochastic.Chains.Benchmarks.Steps;

/// <summary>
/// One row of the exponential of a queue's rates: the whole call, with its proof, against the product of MathNet.Numerics for the truncated
/// series of the same uniformized chain, without any bound.
/// </summary>
[MemoryDiagnoser]
public class AfterTimeBenchmarks
{
    private const double Time = 100;

    private ChainStart<int> _start = Chain.FromMatrix(new[,] { { 1.0 } }).StartingIn(0);
    private Matrix<double> _matrix = Matrix<double>.Build.Dense(1, 1);
    private double _jumps;

    /// <summary>The number of states.</summary>
    [Params(10, 1_000)]
    public int States { get; set; }

    /// <summary>Makes the inputs once: arrivals at rate 0.8, service at rate 1; invented figures.</summary>
    [GlobalSetup]
    public void Setup()
    {
        var chain = Chain.FromRates(Enumerable.Range(0, States - 1).SelectMany(k => new[]
        {
            new TransitionRate<int>(k, k + 1, 0.8), new TransitionRate<int>(k + 1, k, 1.0),
        }));
        _start = chain.StartingIn(0);
        _matrix = chain.ToMatrix().Transpose();
        _jumps = Time * chain.UniformizationRate!.Value;
        var difference = (Vector<double>.Build.Dense(AfterTime().ToArray()) - Series()).AbsoluteMaximum();
        if (difference > 1e-9)
        {
            throw new InvalidOperationException($"The two answers differ by {difference}, so their times mean nothing.");
        }
    }

    /// <summary>What one would write with MathNet.Numerics alone: the Poisson series, which underflows for longer times.</summary>
    [Benchmark(Baseline = true)]
    public Vector<double> Series()
    {
        var current = Vector<double>.Build.Dense(_start.Distribution.ToArray());
        var sum = current * Math.Exp(-_jumps);
        var weight = Math.Exp(-_jumps);
        for (var k = 1; k < _jumps + (10 * Math.Sqrt(_jumps)); k++)
        {
            current = _matrix * current;
            weight *= _jumps / k;
            sum += weight * current;
        }

        return sum;
    }

    /// <summary>Uniformization with a proved bound: the default.</summary>
    [Benchmark]
    public TimeDistribution<int> AfterTime() => _start.AfterTime(Time);
}
