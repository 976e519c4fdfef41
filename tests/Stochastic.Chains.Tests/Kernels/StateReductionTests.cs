using Stochastic.Chains.Kernels;
using Stochastic.Chains.Tests.Support;

namespace Stochastic.Chains.Tests.Kernels;

/// <summary>The fast elimination on every kind of vectors, whatever the machine, at sizes around the edges of its bands and blocks.</summary>
public class StateReductionTests
{
    private const int LargestExact = 40;

    public static TheoryData<string> InstructionSets =>
        [nameof(InstructionSet.Vector512), nameof(InstructionSet.Vector256), nameof(InstructionSet.Portable)];

    [Theory]
    [MemberData(nameof(InstructionSets))]
    public void Every_kind_of_vectors_keeps_the_digits_of_every_share(string vectors)
    {
        var instructions = Enum.Parse<InstructionSet>(vectors);
        var checkedChains = 0;
        foreach (var name in new[] { "random dense", "nearly decomposable", "graded", "periodic", "random sparse" })
        {
            foreach (var size in new[] { 2, 3, 7, 8, 9, 15, 16, 17, 23, 24, 25, 31, 33, LargestExact })
            {
                var sample = ChainFamilies.Named(name).Create(size, (ulong)size);
                var shares = Solve(sample.ToChain(), instructions, threads: 1);
                shares.Zip(sample.ToExact().Stationary(), (computed, exact) => exact.RelativeDifference(computed)).Max()
                    .Should().BeLessThanOrEqualTo(Tolerances.SubtractionFree(size), $"{sample}, {instructions}");
                checkedChains++;
            }
        }

        checkedChains.Should().Be(70);
    }

    [Theory]
    [MemberData(nameof(InstructionSets))]
    public void Blocks_keep_the_digits_too(string vectors)
    {
        var instructions = Enum.Parse<InstructionSet>(vectors);
        foreach (var (name, size) in new[] { ("random dense", 129), ("nearly decomposable", 257), ("random dense", 385), ("birth-death", 386) })
        {
            var sample = ChainFamilies.Named(name).Create(size, 5);
            var oracle = new DoubleDoubleChain(sample.Matrix).Stationary();
            var shares = Solve(sample.ToChain(), instructions, threads: 1);

            shares.Zip(oracle, (computed, exact) => exact.RelativeDifference(computed)).Max()
                .Should().BeLessThanOrEqualTo(Tolerances.SubtractionFree(size), $"{sample}, {instructions}");
        }
    }

    [Theory]
    [MemberData(nameof(InstructionSets))]
    public void Two_threads_give_the_same_bits_as_one(string vectors)
    {
        var instructions = Enum.Parse<InstructionSet>(vectors);
        foreach (var size in new[] { 383, 384, 500 })
        {
            var chain = ChainFamilies.Named("random dense").Create(size, 11).ToChain();

            Solve(chain, instructions, threads: 2).Should().Equal(Solve(chain, instructions, threads: 1));
        }
    }

    [Theory]
    [MemberData(nameof(InstructionSets))]
    public void A_product_of_matrices_equals_the_sum_of_products(string vectors)
    {
        var instructions = Enum.Parse<InstructionSet>(vectors);
        var random = new SplitMix64(3);
        foreach (var (rows, inner, columns) in new[] { (1, 1, 1), (3, 5, 7), (8, 24, 24), (9, 25, 49), (65, 130, 33) })
        {
            double[] left = Numbers(rows * inner, random), right = Numbers(inner * columns, random), target = Numbers(rows * columns, random);
            var expected = (double[])target.Clone();
            for (var i = 0; i < rows; i++)
            {
                for (var j = 0; j < columns; j++)
                {
                    for (var k = 0; k < inner; k++)
                    {
                        expected[(i * columns) + j] += left[(i * inner) + k] * right[(k * columns) + j];
                    }
                }
            }

            MatrixMultiply.Add(
                new MatrixView(left, 0, inner), new MatrixView(right, 0, columns), new MatrixView(target, 0, columns),
                rows, inner, columns, instructions, new WorkSharing(2, CancellationToken.None));

            target.Zip(expected, (computed, exact) => Math.Abs(computed - exact) / exact).Max()
                .Should().BeLessThanOrEqualTo(Tolerances.SubtractionFree(inner), $"{rows} x {inner} x {columns}, {instructions}");
        }
    }

    [Fact]
    public void Several_right_hand_sides_at_once_solve_like_one_after_the_other()
    {
        const int pivots = 150;
        const int exits = 3;
        var random = new SplitMix64(9);
        var rates = Numbers(pivots * (pivots + exits), random);
        var sums = new double[pivots];
        var table = new MatrixView(rates, 0, pivots + exits);
        var given = Numbers(pivots * exits, random);
        StateReduction.Eliminate(table, pivots, pivots + exits, pivots, sums, 1, InstructionSet.Widest, CancellationToken.None).Should().BeTrue();

        var together = (double[])given.Clone();
        ReductionSolve.SolveRight(
            table, sums, pivots, new MatrixView(together, 0, exits), exits, InstructionSet.Widest, new WorkSharing(1, CancellationToken.None)).Should().BeTrue();
        for (var exit = 0; exit < exits; exit++)
        {
            var alone = Enumerable.Range(0, pivots).Select(state => given[(state * exits) + exit]).ToArray();
            ReductionSolve.SolveRight(table, sums, pivots, alone).Should().BeTrue();

            alone.Select((value, state) => Math.Abs(together[(state * exits) + exit] - value) / value).Max()
                .Should().BeLessThanOrEqualTo(Tolerances.SubtractionFree(pivots));
        }
    }

    [Fact]
    public void A_product_outside_the_range_is_noticed_and_no_number_is_returned_for_it()
    {
        double[] rates = [0, 1e-200, 1, 1, 0, 1e-300, 1e-200, 1, 0];

        StateReduction.Eliminate(
            new MatrixView(rates, 0, 3), 3, 3, 2, new double[2], 1, InstructionSet.Widest, CancellationToken.None).Should().BeFalse();
    }

    [Fact]
    public void A_cancelled_token_ends_the_elimination_and_the_next_solve_is_right()
    {
        var chain = ChainFamilies.Named("random dense").Create(500, 2).ToChain();
        using var source = new CancellationTokenSource();
        source.Cancel();
        var before = Solve(chain, InstructionSet.Widest, threads: 2);

        chain.Invoking(it => it.Stationary(new SolveOptions { CancellationToken = source.Token })).Should().Throw<OperationCanceledException>();
        Solve(chain, InstructionSet.Widest, threads: 2).Should().Equal(before);
    }

    private static double[] Solve(Chain<int> chain, InstructionSet instructions, int threads) => chain.Stationary(
        new EliminationMethod { Instructions = instructions },
        new SolveOptions { CertificateLevel = CertificateLevel.None, Parallelism = threads }).ToArray();

    private static double[] Numbers(int count, SplitMix64 random) => [.. Enumerable.Range(0, count).Select(_ => 0.001 + random.NextFraction())];
}
