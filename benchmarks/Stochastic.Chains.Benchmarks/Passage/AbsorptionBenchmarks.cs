using BenchmarkDotNet.Attributes;

namespace Stochastic.Chains.Benchmarks.Passage;

/// <summary>Where things end: ten closed classes behind a full random transient part, against one elimination of a chain of that size.</summary>
[MemoryDiagnoser]
public class AbsorptionBenchmarks
{
    private const int Ends = 10;

    private static readonly SolveOptions WithoutEvidence = new() { CertificateLevel = CertificateLevel.None };

    private Chain<int> _full = Chain.FromMatrix(new[,] { { 1.0 } });
    private Chain<int> _ending = Chain.FromMatrix(new[,] { { 1.0 } });

    /// <summary>The number of states.</summary>
    [Params(500, 2000)]
    public int States { get; set; }

    /// <summary>Makes the inputs once.</summary>
    [GlobalSetup]
    public void Setup()
    {
        var matrix = InventedMatrices.Dense(States);
        _full = Chain.FromMatrix(matrix);
        for (var from = States - Ends; from < States; from++)
        {
            for (var to = 0; to < States; to++)
            {
                matrix[from, to] = from == to ? 1 : 0;
            }
        }

        _ending = Chain.FromMatrix(matrix);
    }

    /// <summary>One elimination.</summary>
    [Benchmark(Baseline = true)]
    public StationaryDistribution<int> OneElimination() => _full.Stationary(WithoutEvidence);

    /// <summary>Probabilities of all ends and mean steps.</summary>
    [Benchmark]
    public Absorption<int> Absorption() => _ending.Absorption(WithoutEvidence);
}
