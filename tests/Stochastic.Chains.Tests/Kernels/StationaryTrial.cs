using System.Collections.Concurrent;
using Stochastic.Chains.Kernels;
using Stochastic.Chains.Tests.Support;

namespace Stochastic.Chains.Tests.Kernels;

/// <summary>A chain with its exact stationary distribution, and vectors that come near it in several ways.</summary>
internal sealed class StationaryTrial
{
    private const int ChainsPerFamily = 200;
    private const int LargestSize = 40;

    private static readonly ConcurrentDictionary<string, StationaryTrial[]> Trials = new();

    private readonly SampleChain _sample;
    internal double[] Table { get; }

    internal StationaryTrial(SampleChain sample)
    {
        _sample = sample;
        Exact = sample.ToExact().Stationary();
        Table = [.. sample.Matrix.Cast<double>()];
    }

    /// <summary>The families whose chains all have one recurrent class of all states.</summary>
    public static TheoryData<string> Families => [.. ChainFamilies.Irreducible.Select(family => family.Name)];

    /// <summary>The trials of a family whose probabilities all are normal doubles; made once.</summary>
    internal static StationaryTrial[] Of(string family) => Trials.GetOrAdd(family, name =>
        [.. ChainFamilies.Named(name).Samples(ChainsPerFamily, LargestSize).Select(sample => new StationaryTrial(sample)).Where(trial => trial.IsInRange)]);

    internal Rational[] Exact { get; }

    internal int Count => _sample.StateCount;

    internal int[] States => [.. Enumerable.Range(0, Count)];

    internal DenseRates Dense => new(Table, Count);

    internal SparseRates Sparse
    {
        get
        {
            var moves = _sample.Transitions.ToArray();
            var starts = new int[Count + 1];
            foreach (var move in moves)
            {
                starts[move.From + 1]++;
            }

            for (var state = 0; state < Count; state++)
            {
                starts[state + 1] += starts[state];
            }

            return new(new CompressedRows(starts, [.. moves.Select(move => move.To)], [.. moves.Select(move => move.Probability)]));
        }
    }

    /// <summary>Whether a double can hold every probability.</summary>
    internal bool IsInRange => Exact.All(share => double.IsNormal(share.ToDouble()));

    internal double[] Rounded() => [.. Exact.Select(share => share.ToDouble())];

    /// <summary>The vector that state reduction computes in doubles of extended range.</summary>
    internal double[] Reduced()
    {
        var reduction = new GeneralReduction<ScaledDouble>([.. Table.Select(rate => (ScaledDouble)rate)], Count, Count, Count - 1);
        reduction.Eliminate(null, CancellationToken.None);
        var weights = new ScaledDouble[Count];
        weights[^1] = ScaledDouble.One;
        reduction.ExtendLeft(weights);
        var total = weights.Aggregate((sum, weight) => sum + weight);
        return [.. weights.Select(weight => (weight / total).ToDouble())];
    }

    /// <summary>The true distribution with every second state off by so much of itself.</summary>
    internal double[] WrongInBlock(double error)
    {
        var values = Rounded();
        for (var state = 0; state < Count; state += 2)
        {
            values[state] *= 1 + error;
        }

        return values;
    }

    /// <summary>The largest relative error of a vector, exact but for one rounding.</summary>
    internal double TrueError(double[] values) => Exact.Zip(values, (share, value) => share.RelativeDifference(value)).Max();

    public override string ToString() => _sample.ToString();
}
