using BenchmarkDotNet.Attributes;

namespace Stochastic.Chains.Benchmarks.Sensitivity;

/// <summary>The slope of long-run shares against the plain difference of two solves, on an invented dense chain.</summary>
public class DerivativeBenchmarks
{
    private readonly ProbabilityChange<int>[] _direction = [new(0, 1, 1), new(0, 0, -1)];

    private Chain<int> _chain = Chain.FromMatrix(new[,] { { 1.0 } });

    /// <summary>The number of states.</summary>
    [Params(10, 100, 500)]
    public int States { get; set; }

    /// <summary>Makes the chain once.</summary>
    [GlobalSetup]
    public void Setup() => _chain = Chain.FromMatrix(InventedMatrices.Dense(States));

    /// <summary>The derivative.</summary>
    [Benchmark]
    public StateDerivatives<int> Derivative() => _chain.StationaryDerivative(_direction);

    /// <summary>The group inverse.</summary>
    [Benchmark]
    public GroupInverse<int> GroupInverse() => _chain.GroupInverse();
}
