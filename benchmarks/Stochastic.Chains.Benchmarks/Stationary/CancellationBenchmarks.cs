using System.Diagnostics.CodeAnalysis;
using BenchmarkDotNet.Attributes;

namespace Stochastic.Chains.Benchmarks.Stationary;

/// <summary>
/// How long a solve that is well under way takes to stop: the time from Cancel() until the exception is out. The aim is at most 50
/// milliseconds at 2,000 states.
/// </summary>
[SuppressMessage("Design", "CA1001", Justification = "The source is disposed of after each iteration.")]
public class CancellationBenchmarks
{
    private const int States = 2000;
    private static readonly TimeSpan UnderWay = TimeSpan.FromMilliseconds(25);

    private readonly Chain<int> _chain = Chain.FromMatrix(InventedMatrices.Dense(States));
    private CancellationTokenSource _source = new();
    private Task<StationaryDistribution<int>>? _solve;

    /// <summary>The threads that the solve uses.</summary>
    [Params(1, 2)]
    public int Threads { get; set; }

    /// <summary>Finds the structure, which is kept with the chain.</summary>
    [GlobalSetup]
    public void Setup() => _chain.Structure();

    /// <summary>Starts a solve and lets it come to the middle of its work.</summary>
    [IterationSetup]
    public void Begin()
    {
        _source = new CancellationTokenSource();
        var options = new SolveOptions { CancellationToken = _source.Token, Parallelism = Threads };
        _solve = Task.Run(() => _chain.Stationary(options));
        Thread.Sleep(UnderWay);
    }

    /// <summary>Cancels and waits for the exception.</summary>
    [Benchmark]
    public void FromCancelToException()
    {
        _source.Cancel();
        try
        {
            _solve!.Wait();
        }
        catch (AggregateException cancelled) when (cancelled.InnerException is OperationCanceledException)
        {
            return;
        }

        throw new InvalidOperationException("The solve had ended before it was cancelled, so nothing was measured.");
    }

    /// <summary>Gives the source back.</summary>
    [IterationCleanup]
    public void End() => _source.Dispose();
}
