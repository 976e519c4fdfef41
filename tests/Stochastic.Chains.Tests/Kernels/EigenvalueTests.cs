using System.Numerics;
using MathNet.Numerics.LinearAlgebra;
using Stochastic.Chains.Kernels;

namespace Stochastic.Chains.Tests.Kernels;

public class EigenvalueTests
{
    [Theory]
    [InlineData(1)]
    [InlineData(2)]
    [InlineData(5)]
    [InlineData(20)]
    public void The_Ehrenfest_urn_has_eigenvalues_one_minus_two_k_over_N(int balls)
    {
        // Kac, Random walk and the theory of Brownian motion, Amer. Math. Monthly 54 (1947) 369-391.
        var expected = Enumerable.Range(0, balls + 1).Select(k => new Complex(1 - (2.0 * k / balls), 0)).ToList();

        var computed = EigenChecks.Eigenvalues(EigenCases.Ehrenfest(balls + 1), balls + 1);

        EigenChecks.LargestMismatch(computed, expected).Should().BeLessThan(1e-12);
        computed.Should().OnlyContain(value => value.Imaginary == 0);
    }

    [Fact]
    public void The_walk_on_a_cycle_of_twelve_has_the_cosines_as_eigenvalues()
    {
        // Levin, Peres and Wilmer, Markov Chains and Mixing Times, AMS 2009, ch. 12.
        var expected = Enumerable.Range(0, 12).Select(k => new Complex(Math.Cos(2 * Math.PI * k / 12), 0)).ToList();

        EigenChecks.LargestMismatch(EigenChecks.Eigenvalues(EigenCases.CycleWalk(12), 12), expected).Should().BeLessThan(EigenChecks.Bound(12) * Math.Sqrt(12));
    }

    [Theory]
    [InlineData(3)]
    [InlineData(12)]
    [InlineData(41)]
    public void A_rotation_has_the_roots_of_unity_as_eigenvalues(int order)
    {
        // The characteristic polynomial is λⁿ − 1; the matrix is normal, so eigenvalues move no more than the matrix does.
        EigenChecks.LargestMismatch(EigenChecks.Eigenvalues(EigenCases.Cycle(order), order), [.. RootsOfUnity(order)])
            .Should().BeLessThan(EigenChecks.Bound(order) * Math.Sqrt(order));
    }

    [Theory]
    [InlineData(7, 1)]
    [InlineData(30, 2)]
    [InlineData(50, 3)]
    public void A_permutation_has_the_roots_of_unity_of_each_of_its_cycles(int order, int seed)
    {
        var images = EigenCases.Shuffled(order, new Random(seed));
        var expected = CycleLengths(images).SelectMany(RootsOfUnity).ToList();

        EigenChecks.LargestMismatch(EigenChecks.Eigenvalues(EigenCases.Permutation(images), order), expected)
            .Should().BeLessThan(EigenChecks.Bound(order) * Math.Sqrt(order));
    }

    [Fact]
    public void A_triangular_matrix_has_its_diagonal_exactly()
    {
        var matrix = EigenCases.Table(9, (row, column) => column < row ? 0 : 1.0 / (1 + row + (2 * column)));

        EigenChecks.Eigenvalues(matrix, 9).Should().Equal(Enumerable.Range(0, 9).Select(row => new Complex(1.0 / (1 + (3 * row)), 0)));
    }

    [Fact]
    public void A_companion_matrix_has_the_roots_of_its_polynomial()
    {
        // (x − 1)(x − 2)(x − 3)(x² + 1) = x⁵ − 6x⁴ + 12x³ − 12x² + 11x − 6, multiplied out by hand.
        double[] coefficients = [6, -12, 12, -11, 6];
        var matrix = EigenCases.Table(5, (row, column) => row == 0 ? coefficients[column] : row == column + 1 ? 1 : 0);

        EigenChecks.LargestMismatch(EigenChecks.Eigenvalues(matrix, 5), [1, 2, 3, Complex.ImaginaryOne, -Complex.ImaginaryOne]).Should().BeLessThan(1e-12);
    }

    [Fact]
    public void The_eight_states_of_Courtois_have_the_published_eigenvalues()
    {
        // Courtois, Decomposability, Academic Press 1977; eigenvalues as reprinted to four places in Stewart, Introduction to the Numerical
        // Solution of Markov Chains, Princeton 1994, ch. 6 (from memory), continued to more digits by exact recomputation.
        Complex[] expected =
        [
            1, 0.9998, 0.99849479689133919, 0.75002623150850386, 0.55006663986826569, 0.40003338516446515, 0.30071431880875891, -0.14953537224133279,
        ];

        EigenChecks.LargestMismatch(EigenChecks.Eigenvalues(PublishedChains.Courtois, 8), expected).Should().BeLessThan(1e-13);
    }

    [Fact]
    public void A_shuffle_has_its_fixed_point_eigenvalues_with_their_multiplicities()
    {
        // Top-to-random shuffle of four cards: eigenvalue j/4 as often as there are permutations with j fixed points: 9, 8, 6, 0, 1.
        // Diaconis, Fill and Pitman, Combin. Probab. Comput. 1 (1992) 135-155.
        var expected = new[] { (0.0, 9), (0.25, 8), (0.5, 6), (1.0, 1) }.SelectMany(item => Enumerable.Repeat(new Complex(item.Item1, 0), item.Item2)).ToList();

        EigenChecks.LargestMismatch(EigenChecks.Eigenvalues(PublishedChains.TopToRandomOfFourCards(), 24), expected).Should().BeLessThan(1e-12);
    }

    [Theory]
    [InlineData(4)]
    [InlineData(7)]
    [InlineData(12)]
    public void A_Jordan_block_scatters_its_eigenvalue_by_a_root_of_roundoff_and_keeps_the_mean(int order)
    {
        // A perturbation ε moves the eigenvalue of a Jordan block of order m by about the m-th root of ε (Wilkinson 1965, ch. 2).
        var computed = EigenChecks.Eigenvalues(EigenCases.Reversed(EigenCases.Ageing(order), order), order);

        var cluster = computed.OrderBy(value => Complex.Abs(value - 1)).Skip(1).ToList();
        cluster.Should().OnlyContain(value => Complex.Abs(value - 0.5) <= 2 * Math.Pow(EigenChecks.Bound(order), 1.0 / (order - 1)));
        computed.Aggregate(Complex.Zero, (sum, value) => sum + value).Real.Should().BeApproximately(1 + (0.5 * (order - 1)), EigenChecks.Bound(order) * order);
    }

    [Theory]
    [InlineData(1, 2, -3, 1, 1, 2.4494897427831779)]
    [InlineData(0, 1e-150, -1e-150, 0, 0, 1e-150)]
    [InlineData(4e300, 1e300, -1e300, 4e300, 4e300, 1e300)]
    public void A_two_by_two_matrix_has_its_complex_pair(double a, double b, double c, double d, double real, double imaginary)
    {
        // Equal diagonals: a ± i √(−b c).
        var computed = EigenChecks.Eigenvalues([a, b, c, d], 2);

        computed[1].Should().Be(Complex.Conjugate(computed[0]));
        computed[0].Real.Should().BeApproximately(real, 4e-16 * real);
        computed[0].Imaginary.Should().BeApproximately(imaginary, 4e-16 * imaginary);
    }

    [Fact]
    public void A_lopsided_pair_is_found_by_its_block_and_after_balancing()
    {
        // ± i √(−b c), though c is far below roundoff of b: unbalanced sweeps may drop it.
        new DiagonalBlock(0, 1e200, -1e-200, 0).UpperEigenvalue().Imaginary.Should().BeApproximately(1, 4e-16);
        EigenChecks.Eigenvalues([0, 1e100, -1e-100, 0], 2, balance: true)[0].Imaginary.Should().BeApproximately(1, 4e-16);
    }

    [Fact]
    public void One_entry_is_its_own_eigenvalue()
    {
        EigenChecks.Eigenvalues([-0.7], 1).Should().Equal(new Complex(-0.7, 0));
    }

    [Theory]
    [InlineData(10, 1)]
    [InlineData(33, 2)]
    [InlineData(64, 3)]
    public void MathNet_finds_the_same_eigenvalues_of_benign_matrices(int order, int seed)
    {
        var matrix = EigenCases.RandomStochastic(order, new Random(seed));
        var reference = Matrix<double>.Build.Dense(order, order, (row, column) => matrix[(row * order) + column]).Evd(Symmetricity.Asymmetric);

        EigenChecks.LargestMismatch(EigenChecks.Eigenvalues(matrix, order), [.. reference.EigenValues]).Should().BeLessThan(1e-13);
        EigenChecks.LargestMismatch(EigenChecks.Eigenvalues(matrix, order, balance: true), [.. reference.EigenValues]).Should().BeLessThan(1e-13);
    }

    private static IEnumerable<Complex> RootsOfUnity(int order) => Enumerable.Range(0, order).Select(k => Complex.FromPolarCoordinates(1, 2 * Math.PI * k / order));

    private static IEnumerable<int> CycleLengths(int[] images)
    {
        var seen = new bool[images.Length];
        foreach (var start in images)
        {
            var length = 0;
            for (var state = start; !seen[state]; state = images[state])
            {
                seen[state] = true;
                length++;
            }

            if (length > 0)
            {
                yield return length;
            }
        }
    }
}
