using BenchmarkDotNet.Attributes;
using BenchmarkDotNet.Engines;

namespace Stochastic.Chains.Benchmarks.Model;

/// <summary>Making a large chain from single moves: time, and bytes allocated for each move.</summary>
/// <remarks>Set the environment variable <c>BENCHMARK_LARGE</c> to 1 to add ten million moves.</remarks>
[MemoryDiagnoser]
[Config(typeof(BytesPerMoveConfig))]
[SimpleJob(RunStrategy.Monitoring, launchCount: 1, warmupCount: 1, iterationCount: 3)]
public class FromTransitionsBenchmarks
{
    private const int MovesPerState = 10;

    private Transition<int>[] _transitions = [];

    /// <summary>The numbers of moves to measure.</summary>
    public static IEnumerable<int> Sizes => Environment.GetEnvironmentVariable("BENCHMARK_LARGE") == "1" ? [1_000_000, 10_000_000] : [1_000_000];

    /// <summary>The number of moves.</summary>
    [ParamsSource(nameof(Sizes))]
    public int Transitions { get; set; }

    /// <summary>Makes the moves once.</summary>
    [GlobalSetup]
    public void Setup() => _transitions = InventedMatrices.TenEach(Transitions / MovesPerState);

    /// <summary>The whole call, validation included.</summary>
    [Benchmark]
    public Chain<int> FromTransitions() => Chain.FromTransitions(_transitions);
}
