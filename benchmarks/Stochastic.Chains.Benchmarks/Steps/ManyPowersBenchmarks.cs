using BenchmarkDotNet.Attributes;

namespace Stochastic.Chains.Benchmarks.Steps;

/// <summary>Several powers of one full random chain, 1,000 to 2,000 steps: one spectrum for all, or squaring or propagation for each.</summary>
public class ManyPowersBenchmarks
{
    private const int FirstPower = 1000;

    private Chain<int> _chain = Chain.FromMatrix(new[,] { { 1.0 } });

    /// <summary>The number of states.</summary>
    [Params(10, 100)]
    public int States { get; set; }

    /// <summary>The number of powers asked for.</summary>
    [Params(1, 10, 100)]
    public int Queries { get; set; }

    private IEnumerable<int> Powers => Enumerable.Range(0, Queries).Select(query => FirstPower + (query * FirstPower / Queries));

    /// <summary>Makes the chain once.</summary>
    [GlobalSetup]
    public void Setup() => _chain = Chain.FromMatrix(InventedMatrices.Dense(States));

    /// <summary>Whole matrices by squaring.</summary>
    [Benchmark(Baseline = true)]
    public double Squaring() => Powers.Sum(steps => _chain.NStep(steps, new SquaringMethod())[0, 1]);

    /// <summary>Whole matrices from one spectrum, its making included.</summary>
    [Benchmark]
    public double OneSpectrum()
    {
        var spectrum = _chain.Spectrum();
        return Powers.Sum(steps => spectrum.NStep(steps)[0, 1]);
    }

    /// <summary>One row from one spectrum, its making included.</summary>
    [Benchmark]
    public double OneSpectrumOneRow()
    {
        var spectrum = _chain.Spectrum();
        return Powers.Sum(steps => spectrum.NStep(0, steps)[1]);
    }

    /// <summary>One row step by step.</summary>
    [Benchmark]
    public double PropagationOneRow() => Powers.Sum(steps => _chain.StartingIn(0).After(steps)[1]);
}
