using BenchmarkDotNet.Attributes;
using Stochastic.Chains.Tests.Support;

namespace Stochastic.Chains.Benchmarks.Stationary;

/// <summary>
/// Long-run shares by each method on chains of several families, with their proofs, against what one would write with MathNet.Numerics alone. An
/// iterative method that does not converge is timed until it gives up; how right the answers are is another table.
/// </summary>
[MemoryDiagnoser]
public class StationaryMethodBenchmarks
{
    private const int States = 90;
    private const ulong Seed = 1;
    private const string Random = "random dense";
    private const string Periodic = "periodic";

    private static readonly SolveOptions Defaults = new();

    private Chain<int> _chain = Chain.FromMatrix(new[,] { { 1.0 } });
    private BalanceEquations _equations = new(new double[0, 0]);

    /// <summary>The family of chains; the last two have three groups and moves of that size between them.</summary>
    [Params(Random, Periodic, "groups 1E-3", "groups 1E-9")]
    public string Family { get; set; } = Random;

    /// <summary>Makes the inputs once.</summary>
    [GlobalSetup]
    public void Setup()
    {
        var matrix = Family switch
        {
            Random or Periodic => ChainFamilies.Named(Family).Create(States, Seed).Matrix,
            _ => InventedMatrices.Grouped(States, RowWeights.PowerOfTen(int.Parse(Family[^2..], System.Globalization.CultureInfo.InvariantCulture)), Seed),
        };
        _chain = Chain.FromMatrix(matrix);
        _equations = new BalanceEquations(matrix);
    }

    /// <summary>What one would write with MathNet.Numerics alone.</summary>
    [Benchmark(Baseline = true)]
    public double[] MathNetLinearSystem() => _equations.ByDecomposition();

    /// <summary>State reduction.</summary>
    [Benchmark]
    public StationaryDistribution<int> Elimination() => By(new EliminationMethod());

    /// <summary>Aggregation and disaggregation.</summary>
    [Benchmark]
    public StationaryDistribution<int> Aggregation() => By(new AggregationMethod());

    /// <summary>Gauss-Seidel.</summary>
    [Benchmark]
    public StationaryDistribution<int> GaussSeidel() => By(new GaussSeidelMethod());

    /// <summary>The power method.</summary>
    [Benchmark]
    public StationaryDistribution<int> Power() => By(new PowerMethod());

    /// <summary>The linear system with its certificate.</summary>
    [Benchmark]
    public StationaryDistribution<int> LinearSystem() => By(new LinearSystemMethod());

    /// <summary>The eigenvector with its certificate.</summary>
    [Benchmark]
    public StationaryDistribution<int> Eigen() => By(new EigenMethod());

    private StationaryDistribution<int> By(IStationaryMethod method)
    {
        _ = _chain.TryStationary(method, Defaults, out var shares);
        return shares;
    }
}
