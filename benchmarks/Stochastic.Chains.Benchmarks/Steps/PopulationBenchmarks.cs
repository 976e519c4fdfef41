using BenchmarkDotNet.Attributes;

namespace Stochastic.Chains.Benchmarks.Steps;

/// <summary>A year of an invented pool with weekly recruitment: expected numbers, and the law of the number in one state.</summary>
[MemoryDiagnoser]
public class PopulationBenchmarks
{
    private const int Weeks = 52;

    private Population<string> _population = Chain.FromTransitions([new Transition<string>("a", "a", 1.0)]).StartingWith();
    private PopulationForecast<string> _forecast = Chain.FromTransitions([new Transition<string>("a", "a", 1.0)]).StartingWith().Forecast(0);

    /// <summary>The number of items at the start.</summary>
    [Params(1_000, 100_000)]
    public int Items { get; set; }

    /// <summary>Makes the inputs once.</summary>
    [GlobalSetup]
    public void Setup()
    {
        _population = Chain.Build<string>(rows => rows
                .Row("clean", ("clean", 0.20), ("at shop", 0.80))
                .Row("at shop", ("at shop", 0.50), ("dirty", 0.49), ("lost", 0.01))
                .Row("dirty", ("clean", 1.00))
                .Row("lost", ("lost", 1.00)))
            .StartingWith(("clean", Items / 2), ("at shop", Items / 2)).WithRecruitment(("clean", Items / 100));
        _forecast = _population.Forecast(Weeks);
    }

    /// <summary>Expected numbers at every step.</summary>
    [Benchmark]
    public PopulationForecast<string> Forecast() => _population.Forecast(Weeks);

    /// <summary>The law of the number in one state at the last step.</summary>
    [Benchmark]
    public CountDistribution Count() => _forecast.Count("clean", Weeks);
}
