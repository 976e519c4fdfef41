using BenchmarkDotNet.Attributes;

namespace Stochastic.Chains.Benchmarks.Estimation;

/// <summary>Estimating and testing, from an invented path.</summary>
[MemoryDiagnoser]
public class EstimateBenchmarks
{
    private int[] _path = [];
    private TransitionCounts<int> _counts = TransitionCounts.FromPath([0, 0]);

    /// <summary>The number of states.</summary>
    [Params(10, 100)]
    public int States { get; set; }

    /// <summary>Draws the path once.</summary>
    [GlobalSetup]
    public void Setup()
    {
        var stream = new RandomNumbers(1);
        _path = [.. Enumerable.Range(0, 1_000_000).Select(_ => stream.NextIndex(States)), .. Enumerable.Range(0, States)];
        _counts = CountWithHistory();
    }

    /// <summary>A million moves, single moves only.</summary>
    [Benchmark(Baseline = true)]
    public TransitionCounts<int> Count() => TransitionCounts.FromPath(_path);

    /// <summary>A million moves with what came before them.</summary>
    [Benchmark]
    public TransitionCounts<int> CountWithHistory() => TransitionCounts.FromPaths([_path], new PathOptions<int> { KeepsHistory = true });

    /// <summary>The estimate with standard errors.</summary>
    [Benchmark]
    public TransitionEstimate<int> Estimate() => _counts.Estimate();

    /// <summary>Order one against order two.</summary>
    [Benchmark]
    public ChainTest TestSecondOrder() => _counts.TestSecondOrder();
}
