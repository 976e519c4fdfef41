using MathNet.Numerics.LinearAlgebra;
using Stochastic.Chains.Kernels;
using Stochastic.Chains.Passage;
using Stochastic.Chains.Tests.Support;

namespace Stochastic.Chains.Tests.Passage;

/// <summary>What holds for every chain, whatever the vectors, the threads and the storage; and where the textbook formula fails.</summary>
public class FirstPassageIdentityTests
{
    public static TheoryData<string> Families => [.. ChainFamilies.Irreducible.Select(family => family.Name)];

    [Theory]
    [MemberData(nameof(Families))]
    public void Times_back_are_the_reciprocals_of_the_shares_and_Kemenys_constant_is_the_same_from_every_state(string name)
    {
        foreach (var sample in ChainFamilies.Named(name).Samples(20, 30))
        {
            var chain = sample.ToChain();
            var table = chain.MeanFirstPassage();
            var shares = chain.Stationary();
            var allowed = table.Certificate.RelativeErrorBound + shares.Certificate.RelativeErrorBound + Tolerances.FourRoundings;

            foreach (var state in chain.States)
            {
                Math.Abs((table[state, state] * shares[state]) - 1).Should().BeLessThanOrEqualTo(allowed, sample.ToString());
            }

            table.Certificate.Residual.Should().BeLessThanOrEqualTo(Tolerances.SubtractionFree(2 * sample.StateCount), sample.ToString());
            table.KemenySpread.Should().BeLessThanOrEqualTo(Tolerances.SubtractionFree(2 * sample.StateCount), sample.ToString());
            if (sample.StateCount <= 12)
            {
                var exact = sample.ToExact().KemenyConstant();
                if (!exact.IsZero)
                {
                    exact.RelativeDifference(table.KemenyConstant).Should().BeLessThanOrEqualTo(table.KemenyErrorBound, sample.ToString());
                }
            }
        }
    }

    [Theory]
    [InlineData(30)]
    [InlineData(200)]
    [InlineData(450)]
    public void Threads_change_no_bit_and_every_kind_of_vectors_keeps_the_digits(int size)
    {
        var chain = ChainFamilies.Named("random dense").Create(size, 11).ToChain();
        var one = chain.MeanFirstPassage();

        var two = chain.MeanFirstPassage(new SolveOptions { Parallelism = 2 });

        two.Values.SequenceEqual(one.Values).Should().BeTrue();
        foreach (var instructions in new[] { InstructionSet.Vector512, InstructionSet.Vector256, InstructionSet.Portable })
        {
            var other = FirstPassageSolve<int>.Of(chain, new SolveOptions(), instructions);
            foreach (var (first, second) in one.Values.ToArray().Zip(other.Values.ToArray()))
            {
                Math.Abs((first / second) - 1).Should().BeLessThanOrEqualTo(2 * Tolerances.SubtractionFree(size));
            }
        }
    }

    [Fact]
    public void Sparse_storage_gives_the_same_table()
    {
        var chain = ChainFamilies.Named("random sparse").Create(80, 2).ToChain();

        chain.AsSparse().MeanFirstPassage().Values.SequenceEqual(chain.MeanFirstPassage().Values).Should().BeTrue();
    }

    [Theory]
    [InlineData(1e-14)]
    [InlineData(1e-120)]
    public void Times_between_groups_that_hardly_touch_keep_their_digits_where_the_textbook_formula_loses_them(double coupling)
    {
        var matrix = ThreeGroups(coupling);
        var exact = ExactChain.FromMatrix(matrix).MeanFirstPassage();

        var table = Chain.FromMatrix(matrix).MeanFirstPassage();
        var textbook = ThroughFundamentalMatrix(matrix);

        var (ours, theirs) = (0.0, 0.0);
        for (var from = 0; from < 18; from++)
        {
            for (var to = 0; to < 18; to++)
            {
                ours = Math.Max(ours, exact[from, to]!.Value.RelativeDifference(table[from, to]));
                theirs = Math.Max(theirs, double.IsFinite(textbook[from, to]) ? exact[from, to]!.Value.RelativeDifference(textbook[from, to]) : double.PositiveInfinity);
            }
        }

        ours.Should().BeLessThanOrEqualTo(Tolerances.SubtractionFree(18));
        ours.Should().BeLessThanOrEqualTo(table.Certificate.RelativeErrorBound);
        theirs.Should().BeGreaterThan(Tolerances.PrintedDigits(3), "the formula through the fundamental matrix subtracts");
    }

    /// <summary>m_ij = (z_jj − z_ij) / π_j with Z the inverse of I − P + 1·π (Kemeny and Snell 1960), by MathNet.Numerics.</summary>
    private static double[,] ThroughFundamentalMatrix(double[,] matrix)
    {
        var size = matrix.GetLength(0);
        var chain = Matrix<double>.Build.DenseOfArray(matrix);
        var shares = Vector<double>.Build.DenseOfArray(Chain.FromMatrix(matrix).Stationary().ToArray());
        var fundamental = (Matrix<double>.Build.DenseIdentity(size) - chain + Matrix<double>.Build.Dense(size, size, (_, to) => shares[to])).Inverse();
        var times = new double[size, size];
        for (var from = 0; from < size; from++)
        {
            for (var to = 0; to < size; to++)
            {
                times[from, to] = ((from == to ? 1 : 0) + fundamental[to, to] - fundamental[from, to]) / shares[to];
            }
        }

        return times;
    }

    /// <summary>Invented: three groups of six states, each state with a rare move to the group after its own.</summary>
    private static double[,] ThreeGroups(double coupling)
    {
        var random = new SplitMix64(18);
        var matrix = new double[18, 18];
        for (var from = 0; from < 18; from++)
        {
            var group = from / 6 * 6;
            for (var to = group; to < group + 6; to++)
            {
                matrix[from, to] = to == from ? 0 : random.Next(1, 8) / 64.0;
            }

            matrix[from, (from + 6) % 18] = coupling * random.Next(1, 4);
            matrix[from, from] = 1 - Enumerable.Range(0, 18).Where(to => to != from).Sum(to => matrix[from, to]);
        }

        return matrix;
    }
}
