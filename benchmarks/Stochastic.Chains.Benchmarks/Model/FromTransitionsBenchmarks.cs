using BenchmarkDotNet.Attributes;
using MathNet.Numerics.LinearAlgebra;

namespace Stochastic.Chains.Benchmarks.Model;

/// <summary>Making a large chain from single moves, against a sparse matrix of MathNet.Numerics: time, and bytes allocated for each move.</summary>
/// <remarks>Set the environment variable <c>BENCHMARK_LARGE</c> to 1 to add ten million moves.</remarks>
[MemoryDiagnoser]
[Config(typeof(BytesPerMoveConfig))]
public class FromTransitionsBenchmarks
{
    private const int MovesPerState = 10;

    private Transition<int>[] _transitions = [];

    /// <summary>The numbers of moves to measure.</summary>
    public static IEnumerable<int> Sizes => Environment.GetEnvironmentVariable("BENCHMARK_LARGE") == "1" ? [100_000, 1_000_000, 10_000_000] : [100_000, 1_000_000];

    /// <summary>The number of moves.</summary>
    [ParamsSource(nameof(Sizes))]
    public int Transitions { get; set; }

    /// <summary>Makes the moves once.</summary>
    [GlobalSetup]
    public void Setup() => _transitions = InventedMatrices.TenEach(Transitions / MovesPerState);

    /// <summary>What one would write with MathNet.Numerics alone: no states, no checks.</summary>
    [Benchmark(Baseline = true)]
    public Matrix<double> SparseMatrix()
    {
        var states = Transitions / MovesPerState;
        return Matrix<double>.Build.SparseOfIndexed(states, states, _transitions.Select(move => (move.From, move.To, move.Probability)));
    }

    /// <summary>The whole call, validation included.</summary>
    [Benchmark]
    public Chain<int> FromTransitions() => Chain.FromTransitions(_transitions);
}
