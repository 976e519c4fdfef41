using BenchmarkDotNet.Attributes;
using MathNet.Numerics.LinearAlgebra;

namespace Stochastic.Chains.Benchmarks.Passage;

/// <summary>
/// All mean first passage times of a full random chain: the whole call, without and with its proof, against the inverse alone by
/// MathNet.Numerics, with which the textbook formula through the fundamental matrix begins. The rival takes 20 s at 2000 states; raise
/// the sizes of <see cref="States"/> to 1000 and 2000 where that is wanted.
/// </summary>
[MemoryDiagnoser]
public class FirstPassageBenchmarks
{
    private static readonly SolveOptions WithoutEvidence = new() { CertificateLevel = CertificateLevel.None };
    private static readonly SolveOptions OnTwoThreads = new() { CertificateLevel = CertificateLevel.None, Parallelism = 2 };

    private Chain<int> _chain = Chain.FromMatrix(new[,] { { 1.0 } });
    private Matrix<double> _system = Matrix<double>.Build.Dense(1, 1);

    /// <summary>The number of states.</summary>
    [Params(100, 500)]
    public int States { get; set; }

    /// <summary>Makes the inputs once.</summary>
    [GlobalSetup]
    public void Setup()
    {
        _chain = Chain.FromMatrix(InventedMatrices.Dense(States));
        _system = Matrix<double>.Build.DenseIdentity(States) - _chain.ToMatrix() + Matrix<double>.Build.Dense(States, States, 1.0 / States);
        Check(FundamentalMatrix());
    }

    /// <summary>The inverse alone, from which the table would then be assembled.</summary>
    [Benchmark(Baseline = true)]
    public Matrix<double> FundamentalMatrix() => _system.Inverse();

    /// <summary>The table without evidence.</summary>
    [Benchmark]
    public FirstPassageTable<int> Table() => _chain.MeanFirstPassage(WithoutEvidence);

    /// <summary>The table without evidence, on two threads.</summary>
    [Benchmark]
    public FirstPassageTable<int> TableOnTwoThreads() => _chain.MeanFirstPassage(OnTwoThreads);

    /// <summary>The table with residual and proved bound: the default.</summary>
    [Benchmark]
    public FirstPassageTable<int> TableWithProof() => _chain.MeanFirstPassage();

    private void Check(Matrix<double> inverse)
    {
        var table = Table();
        var (from, to) = (0, States - 1);
        var textbook = (inverse[to, to] - inverse[from, to]) * table[to, to];
        if (Math.Abs((textbook / table[from, to]) - 1) > 1e-9)
        {
            throw new InvalidOperationException($"The two tables differ: {textbook} and {table[from, to]}, so their times mean nothing.");
        }
    }
}
