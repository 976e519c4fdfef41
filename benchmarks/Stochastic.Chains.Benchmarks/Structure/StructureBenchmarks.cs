using BenchmarkDotNet.Attributes;
using MathNet.Numerics.LinearAlgebra;

namespace Stochastic.Chains.Benchmarks.Structure;

/// <summary>
/// Classes, recurrence and periods of a chain with ten moves out of each state, against what one would write with MathNet.Numerics alone: which
/// states reach which, by squaring. The structure is kept with a chain, so each call asks a chain that has not been asked yet.
/// </summary>
[MemoryDiagnoser]
public class StructureBenchmarks
{
    private Chain<int> _chain = Chain.FromMatrix(new[,] { { 1.0 } });
    private Matrix<double> _matrix = Matrix<double>.Build.Dense(1, 1);

    /// <summary>The number of states.</summary>
    [Params(20, 200)]
    public int States { get; set; }

    /// <summary>Makes the inputs once.</summary>
    [GlobalSetup]
    public void Setup()
    {
        _chain = Chain.FromTransitions(InventedMatrices.TenEach(States));
        _matrix = _chain.ToMatrix();
        if (IsOneClass() != Structure().IsIrreducible)
        {
            throw new InvalidOperationException("The two answers differ, so their times mean nothing.");
        }
    }

    /// <summary>What one would write with MathNet.Numerics alone; it only says whether all states are one class.</summary>
    [Benchmark(Baseline = true)]
    public bool IsOneClass()
    {
        var reached = _matrix + Matrix<double>.Build.DenseIdentity(States);
        for (var steps = 1; steps < States; steps *= 2)
        {
            reached = (reached * reached).PointwiseSign();
        }

        return reached.ForAll(entry => entry > 0);
    }

    /// <summary>The whole structure.</summary>
    [Benchmark]
    public ChainStructure<int> Structure() => new Chain<int>(_chain.States, _chain.Matrix, [], null).Structure();
}
