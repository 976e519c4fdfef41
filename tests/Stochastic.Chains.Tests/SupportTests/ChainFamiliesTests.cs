using Stochastic.Chains.Tests.Support;

namespace Stochastic.Chains.Tests.SupportTests;

public class ChainFamiliesTests
{
    private const double UnitInLastPlace = 1.0 / (1L << 52);

    public static TheoryData<string> Families => [.. ChainFamilies.All.Select(family => family.Name)];

    /// <summary>The first numbers from seed 1234567, as implementations of the generator agree on (from memory).</summary>
    [Fact]
    public void The_generator_gives_the_known_numbers()
    {
        var random = new SplitMix64(1234567);

        Enumerable.Range(0, 3).Select(_ => random.NextInteger())
            .Should().Equal(6457827717110365317, 3203168211198807973, 9817491932198370423);
    }

    [Fact]
    public void Draws_stay_in_range_and_permutations_are_complete()
    {
        var random = new SplitMix64(5);
        int[] draws = [.. Enumerable.Range(0, 1000).Select(_ => random.Next(-2, 3))];

        draws.Distinct().Order().Should().Equal(-2, -1, 0, 1, 2, 3);
        random.NextPermutation(50).Order().Should().Equal(Enumerable.Range(0, 50));
    }

    [Theory]
    [MemberData(nameof(Families))]
    public void Rows_are_distributions_up_to_rounding(string family)
    {
        foreach (var sample in ChainFamilies.Named(family).Samples(200, 40))
        {
            foreach (var row in sample.Transitions.GroupBy(move => move.From))
            {
                row.Max(move => move.Probability).Should().BeLessThanOrEqualTo(1);
                Rational.Abs(Rational.Sum(row.Select(move => Rational.FromDouble(move.Probability))) - 1).ToDouble()
                    .Should().BeLessThanOrEqualTo(4 * UnitInLastPlace, "{0}", sample);
            }

            sample.Matrix.Cast<double>().Min().Should().BeGreaterThanOrEqualTo(0);
            sample.Transitions.Select(move => move.From).Distinct().Should().HaveCount(sample.StateCount);
        }
    }

    [Theory]
    [MemberData(nameof(Families))]
    public void Structure_is_as_promised(string family)
    {
        var kind = ChainFamilies.Named(family);
        foreach (var sample in kind.Samples(200, 40))
        {
            var structure = sample.ToExact().Structure;
            if (kind.IsIrreducible)
            {
                structure.IsIrreducible.Should().BeTrue("{0}", sample);
            }

            (sample.Target is not null).Should().Be(kind.HasTarget);
            sample.StateCount.Should().BeInRange(kind.MinimumSize, Math.Min(40, kind.MaximumSize));
        }
    }

    [Theory]
    [MemberData(nameof(Families))]
    public void Name_size_and_seed_make_the_same_chain_again(string family)
    {
        var first = ChainFamilies.Named(family).Create(12, 77);
        var again = ChainFamilies.Named(first.Family).Create(first.Size, first.Seed);

        again.Matrix.Should().BeEquivalentTo(first.Matrix, options => options.WithStrictOrdering());
        first.ToString().Should().Contain($"ChainFamilies.Named(\"{family}\").Create(12, 77)");
    }

    [Fact]
    public void Hard_families_reach_the_extremes_and_stay_in_the_normal_range()
    {
        Smallest("graded", sample => sample.OffDiagonals.Min(move => move.Probability)).Should().BeInRange(1e-304, 1e-280);
        Smallest("graded", SmallestStationary).Should().BeInRange(1e-260, 1e-200);
        Smallest("birth-death", SmallestStationary).Should().BeInRange(1e-260, 1e-200);
        Smallest("nearly decomposable", sample => sample.OffDiagonals.Min(move => move.Probability)).Should().BeInRange(1e-253, 1e-230);
        Smallest("rare target", SmallestStationary).Should().BeInRange(1e-255, 1e-230);
        ChainFamilies.Irreducible.Should().OnlyContain(family => Smallest(family.Name, SmallestStationary) > 1e-290);
    }

    [Fact]
    public void Means_to_the_target_are_finite_doubles()
    {
        foreach (var sample in ChainFamilies.All.Where(family => family.HasTarget).SelectMany(family => family.Samples(100, 40)))
        {
            sample.ToExact().HittingMean(sample.Target!.Value).Max(mean => mean!.Value.ToDouble())
                .Should().BeLessThan(1e300, "{0}", sample);
        }
    }

    [Fact]
    public void Reducible_chains_have_transient_states_and_sometimes_several_classes()
    {
        var structures = ChainFamilies.Named("reducible").Samples(100, 40).Select(sample => sample.ToExact().Structure).ToArray();

        structures.Should().OnlyContain(structure => structure.TransientStates.Length > 0);
        structures.Select(structure => structure.RecurrentClasses.Count).Distinct().Order().Should().Equal(1, 2, 3);
    }

    [Fact]
    public void Periodic_chains_are_periodic() =>
        ChainFamilies.Named("periodic").Samples(100, 40).Select(sample => sample.ToExact().Structure.Classes[0].Period).Distinct().Order()
            .Should().Equal(2, 3, 4, 5);

    /// <summary>(P - s)^(n-1) is zero on the quotient by constants, that is all its rows are equal, while (P - s)^(n-2) is not.</summary>
    [Fact]
    public void Defective_chains_have_one_long_jordan_block()
    {
        foreach (var sample in ChainFamilies.Named("defective").Samples(30, 8))
        {
            var stay = sample.Matrix.Cast<double>().Where((_, k) => k % (sample.StateCount + 1) == 0).Order().ElementAt(0);
            var shifted = new Rational[sample.StateCount, sample.StateCount];
            foreach (var (i, j) in Pairs(sample.StateCount))
            {
                shifted[i, j] = Rational.FromDouble(sample.Matrix[i, j]) - (i == j ? Rational.FromDouble(stay) : 0);
            }

            var before = Enumerable.Repeat(shifted, sample.StateCount - 2).Aggregate(Product);
            RowsAreEqual(before).Should().BeFalse("{0}", sample);
            RowsAreEqual(Product(before, shifted)).Should().BeTrue("{0}", sample);
        }
    }

    private static double Smallest(string family, Func<SampleChain, double> measure) =>
        ChainFamilies.Named(family).Samples(60, 20).Min(measure);

    private static double SmallestStationary(SampleChain sample) => sample.ToExact().Stationary().Min(value => value.ToDouble());

    private static IEnumerable<(int I, int J)> Pairs(int count) =>
        from i in Enumerable.Range(0, count) from j in Enumerable.Range(0, count) select (i, j);

    private static Rational[,] Product(Rational[,] left, Rational[,] right)
    {
        var count = left.GetLength(0);
        var product = new Rational[count, count];
        foreach (var (i, j) in Pairs(count))
        {
            product[i, j] = Rational.Sum(Enumerable.Range(0, count).Select(k => left[i, k] * right[k, j]));
        }

        return product;
    }

    private static bool RowsAreEqual(Rational[,] matrix) =>
        Pairs(matrix.GetLength(0)).All(pair => matrix[pair.I, pair.J] == matrix[0, pair.J]);
}
