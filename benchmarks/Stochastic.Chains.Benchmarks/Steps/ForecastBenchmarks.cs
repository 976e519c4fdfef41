using BenchmarkDotNet.Attributes;
using MathNet.Numerics.LinearAlgebra;

namespace Stochastic.Chains.Benchmarks.Steps;

/// <summary>
/// Ten steps of a chain with ten moves out of each state: the whole call, with its certificate, against the sparse product of
/// MathNet.Numerics alone.
/// </summary>
[MemoryDiagnoser]
public class ForecastBenchmarks
{
    private const int Steps = 10;

    private ChainStart<int> _start = Chain.FromMatrix(new[,] { { 1.0 } }).StartingIn(0);
    private Matrix<double> _matrix = Matrix<double>.Build.Dense(1, 1);
    private Vector<double> _initial = Vector<double>.Build.Dense(1);

    /// <summary>The number of states.</summary>
    [Params(1_000, 1_000_000)]
    public int States { get; set; }

    /// <summary>Makes the inputs once.</summary>
    [GlobalSetup]
    public void Setup()
    {
        var chain = Chain.FromTransitions(InventedMatrices.TenEach(States));
        _start = chain.StartingIn(Distribution.Uniform(chain.States));
        _matrix = Matrix<double>.Build.SparseOfIndexed(
            States, States, chain.Transitions.Select(move => (chain.States.IndexOf(move.To), chain.States.IndexOf(move.From), move.Probability)));
        _initial = Vector<double>.Build.Dense(_start.Distribution.ToArray());
    }

    /// <summary>What one would write with MathNet.Numerics alone: the transposed matrix times the vector.</summary>
    [Benchmark(Baseline = true)]
    public Vector<double> SparseProducts()
    {
        var current = _initial;
        for (var step = 0; step < Steps; step++)
        {
            current = _matrix * current;
        }

        return current;
    }

    /// <summary>The distribution after the last step.</summary>
    [Benchmark]
    public StepDistribution<int> After() => _start.After(Steps);

    /// <summary>All steps, held.</summary>
    [Benchmark]
    public Forecast<int> Forecast() => _start.Forecast(Steps);
}
