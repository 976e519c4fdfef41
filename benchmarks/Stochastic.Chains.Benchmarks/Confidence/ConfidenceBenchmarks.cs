using BenchmarkDotNet.Attributes;

namespace Stochastic.Chains.Benchmarks.Confidence;

/// <summary>A thousand draws of a long-run share, from invented counts with every move seen.</summary>
[MemoryDiagnoser]
public class ConfidenceBenchmarks
{
    private static readonly SolveOptions Plain = new() { CertificateLevel = CertificateLevel.None };

    private TransitionCounts<int> _counts = TransitionCounts.FromPath([0, 0]);

    /// <summary>The number of states.</summary>
    [Params(5, 50)]
    public int States { get; set; }

    /// <summary>The threads.</summary>
    [Params(1, 2)]
    public int Threads { get; set; }

    /// <summary>Where the chains come from.</summary>
    [Params(ConfidenceMethod.PosteriorSampling, ConfidenceMethod.ParametricBootstrap)]
    public ConfidenceMethod Method { get; set; }

    /// <summary>Makes the counts once.</summary>
    [GlobalSetup]
    public void Setup()
    {
        var stream = new RandomNumbers(1);
        var table = new long[States, States];
        for (var row = 0; row < States; row++)
        {
            for (var column = 0; column < States; column++)
            {
                table[row, column] = 1 + stream.NextIndex(100);
            }
        }

        _counts = TransitionCounts.FromCounts([.. Enumerable.Range(0, States)], table);
    }

    /// <summary>A thousand draws.</summary>
    [Benchmark]
    public AnswerConfidence LongRunShare() =>
        _counts.Confidence(chain => chain.Stationary(Plain)[0], new ConfidenceOptions<int> { Parallelism = Threads, Method = Method });
}
