using System.Numerics;
using Stochastic.Chains.Kernels;

namespace Stochastic.Chains.Tests.Kernels;

public class SchurEigenvectorTests
{
    public static TheoryData<string> Families => EigenCases.Names;

    [Theory]
    [MemberData(nameof(Families))]
    public void Every_vector_solves_its_own_equation(string family)
    {
        foreach (var (name, order, matrix) in EigenCases.Of(family))
        {
            var form = RealSchurForm.Of(matrix, order, balance: false, CancellationToken.None);
            var eigenvalues = form.Eigenvalues();
            var right = SchurEigenvectors.Right(form, CancellationToken.None);
            var left = SchurEigenvectors.Left(form, CancellationToken.None);

            for (var index = 0; index < order; index++)
            {
                EigenChecks.Residual(matrix, eigenvalues[index], right[index], isLeft: false)
                    .Should().BeLessThanOrEqualTo(EigenChecks.Bound(order), "right vector {0} of {1}, order {2}", index, name, order);
                EigenChecks.Residual(matrix, eigenvalues[index], left[index], isLeft: true)
                    .Should().BeLessThanOrEqualTo(EigenChecks.Bound(order), "left vector {0} of {1}, order {2}", index, name, order);
                ShouldBeNormalized(right[index]);
                ShouldBeNormalized(left[index]);
            }
        }
    }

    [Fact]
    public void Vectors_of_a_pair_are_conjugate_and_those_of_real_eigenvalues_real()
    {
        var matrix = EigenCases.Table(30, (row, column) => Math.Sin((7 * row) + (row * column) + 1));
        var form = RealSchurForm.Of(matrix, 30, balance: false, CancellationToken.None);
        var eigenvalues = form.Eigenvalues();
        var pairs = Enumerable.Range(0, 29).Where(form.IsPairStart).ToList();
        var alone = Enumerable.Range(0, 30).Except(pairs).Except(pairs.Select(row => row + 1)).ToList();

        pairs.Should().NotBeEmpty();
        alone.Should().NotBeEmpty();
        foreach (var vectors in new[] { SchurEigenvectors.Right(form, CancellationToken.None), SchurEigenvectors.Left(form, CancellationToken.None) })
        {
            pairs.Should().OnlyContain(row => eigenvalues[row].Imaginary > 0 && eigenvalues[row + 1] == Complex.Conjugate(eigenvalues[row]));
            pairs.Should().OnlyContain(row => vectors[row + 1].SequenceEqual(vectors[row].Select(Complex.Conjugate)));
            alone.Should().OnlyContain(row => vectors[row].All(entry => entry.Imaginary == 0));
        }
    }

    [Fact]
    public void Left_and_right_vectors_of_different_eigenvalues_are_orthogonal()
    {
        // Eigenvalues near 1, 2, ..., 20: well separated, so yᵀ x of different ones is at most the residuals over the gap.
        var random = new Random(11);
        var matrix = EigenCases.Table(20, (row, column) => (row == column ? row + 1 : 0) + (0.1 * (random.NextDouble() - 0.5)));
        var form = RealSchurForm.Of(matrix, 20, balance: false, CancellationToken.None);
        var right = SchurEigenvectors.Right(form, CancellationToken.None);
        var left = SchurEigenvectors.Left(form, CancellationToken.None);

        for (var row = 0; row < 20; row++)
        {
            for (var column = 0; column < 20; column++)
            {
                var overlap = Complex.Abs(EigenChecks.Product(left[row], right[column]));
                overlap.Should().BeInRange(row == column ? 0.9 : 0, row == column ? 1 + 1e-15 : EigenChecks.Bound(20) * EigenChecks.Norm(matrix));
            }
        }
    }

    [Fact]
    public void A_rotation_has_the_Fourier_vectors()
    {
        // x_j = λʲ / √n for the eigenvalue λ; normal, so that the left vector is its conjugate: yᵀ x = 1.
        var form = RealSchurForm.Of(EigenCases.Cycle(12), 12, balance: false, CancellationToken.None);
        var eigenvalues = form.Eigenvalues();
        var right = SchurEigenvectors.Right(form, CancellationToken.None);
        var left = SchurEigenvectors.Left(form, CancellationToken.None);

        for (var index = 0; index < 12; index++)
        {
            for (var state = 0; state < 12; state++)
            {
                var expected = Complex.Pow(eigenvalues[index], state) * right[index][0];
                Complex.Abs(right[index][state] - expected).Should().BeLessThan(1e-13);
                Complex.Abs(right[index][state]).Should().BeApproximately(1 / Math.Sqrt(12), 1e-13);
            }

            Complex.Abs(EigenChecks.Product(left[index], right[index])).Should().BeApproximately(1, 1e-13);
        }
    }

    [Fact]
    public void Vectors_of_a_triangular_matrix_keep_their_zeros()
    {
        // (1 1 0; 0 2 1; 0 0 3), solved by hand.
        var form = RealSchurForm.Of([1, 1, 0, 0, 2, 1, 0, 0, 3], 3, balance: false, CancellationToken.None);

        var right = SchurEigenvectors.Right(form, CancellationToken.None).Select(vector => Rescaled(vector, 0)).ToList();
        var left = SchurEigenvectors.Left(form, CancellationToken.None).Select(vector => Rescaled(vector, 2)).ToList();

        right[0].Should().Equal(1, 0, 0);
        right[1].Should().Equal(1, 1, 0);
        right[2].Should().Equal(1, 2, 2);
        left[0].Should().Equal(2, -2, 1);
        left[1].Should().Equal(0, -1, 1);
        left[2].Should().Equal(0, 0, 1);
    }

    [Fact]
    public void A_Jordan_block_gives_the_same_vector_again_and_overlap_near_zero()
    {
        var form = RealSchurForm.Of(EigenCases.Ageing(6), 6, balance: false, CancellationToken.None);
        var right = SchurEigenvectors.Right(form, CancellationToken.None);
        var left = SchurEigenvectors.Left(form, CancellationToken.None);

        for (var index = 0; index < 5; index++)
        {
            Complex.Abs(right[index][0]).Should().BeApproximately(1, 1e-14);
            Complex.Abs(EigenChecks.Product(left[index], right[index])).Should().BeLessThan(1e-14);
        }

        Complex.Abs(EigenChecks.Product(left[5], right[5])).Should().BeApproximately(1 / Math.Sqrt(6), 1e-14, "1 is simple; its vectors are e₆ and the ones");
    }

    [Theory]
    [InlineData(false)]
    [InlineData(true)]
    public void Substitution_does_not_overflow_where_vectors_grow_without_bound(bool isLeft)
    {
        // Diagonal 1, 2⁻¹², 2⁻²⁴, ... beside ones: for the eigenvalue 2⁻¹²ᵏ the entries grow in k steps by 2 to the power of up to 6k²,
        // far beyond the range of a double.
        const int order = 80;
        var matrix = EigenCases.Table(order, (row, column) => row == column ? Math.ScaleB(1, -12 * row) : row == column - 1 ? 1 : 0);
        var form = RealSchurForm.Of(matrix, order, balance: false, CancellationToken.None);

        var vectors = isLeft ? SchurEigenvectors.Left(form, CancellationToken.None) : SchurEigenvectors.Right(form, CancellationToken.None);

        vectors.Should().OnlyContain(vector => vector.All(Complex.IsFinite) && vector.Any(entry => entry != Complex.Zero));
        var eigenvalues = form.Eigenvalues();
        for (var index = 0; index < order; index++)
        {
            EigenChecks.Residual(matrix, eigenvalues[index], vectors[index], isLeft).Should().BeLessThanOrEqualTo(EigenChecks.Bound(order));
        }
    }

    [Fact]
    public void A_block_with_an_entry_lost_below_the_range_still_gives_finite_vectors()
    {
        // Rows 4 and 5 form a 2 × 2 block whose upper right entry is about 1e-371: zero in the end.
        double[] matrix =
        [
            1e-93, 0, 0, 0, 0, 0, 0, 1e-178,
            0, 1e-266, 0, 0, 0, 0, 0, 0,
            1e-257, 1e-178, 0, 0, 0, 0, 0, 0,
            0, 0, 1e-280, 0, 0, 1e-149, 0, 0,
            1e-238, 0, 1e-170, 1e-285, 1e-67, 0, 0, 0,
            0, 0, 1e-176, 1e-214, 0, 1e-38, 1e-23, 1e-165,
            0, 0, 1e-165, 1e-189, 1e-13, 0, 0, 0,
            0, 0, 1e-130, 0, 1e-133, 0, 0, 0,
        ];
        var form = RealSchurForm.Of(matrix, 8, balance: false, CancellationToken.None);
        var eigenvalues = form.Eigenvalues();
        var right = SchurEigenvectors.Right(form, CancellationToken.None);
        var left = SchurEigenvectors.Left(form, CancellationToken.None);

        for (var index = 0; index < 8; index++)
        {
            EigenChecks.Residual(matrix, eigenvalues[index], right[index], isLeft: false).Should().BeLessThanOrEqualTo(EigenChecks.Bound(8));
            EigenChecks.Residual(matrix, eigenvalues[index], left[index], isLeft: true).Should().BeLessThanOrEqualTo(EigenChecks.Bound(8));
        }
    }

    [Fact]
    public void The_left_vector_at_one_is_the_stationary_distribution_of_the_urn()
    {
        // Binomial(20, 1/2): Kac, Amer. Math. Monthly 54 (1947) 369-391.
        var expected = Enumerable.Range(0, 21).Select(k => Binomial(20, k) / Math.Pow(2, 20)).ToArray();

        ShouldBeClose(Stationary(EigenCases.Ehrenfest(21), 21), expected, 1e-13);
    }

    [Fact]
    public void The_left_vector_at_one_is_the_published_stationary_distribution_of_Courtois()
    {
        // Courtois 1977, stationary vector to 14 places as reprinted in Stewart 1994, ch. 6 (from memory; confirmed and completed by exact
        // rational recomputation).
        double[] expected =
        [
            0.089282652754501871, 0.092757637505133205, 0.040488312016363944, 0.15853319081982593,
            0.11893820690417505, 0.12038548110605266, 0.27779525244927336, 0.10181926644467398,
        ];

        ShouldBeClose(Stationary(PublishedChains.Courtois, 8), expected, 1e-11);
    }

    [Fact]
    public void The_closest_vector_is_the_one_that_all_vectors_contain()
    {
        var matrix = EigenCases.RandomStochastic(25, new Random(6));
        var form = RealSchurForm.Of(matrix, 25, balance: true, CancellationToken.None);
        var eigenvalues = form.Eigenvalues();
        var all = SchurEigenvectors.Left(form, CancellationToken.None);

        foreach (var target in new[] { 1, 0.05, -0.07, 0 })
        {
            var (eigenvalue, vector) = SchurEigenvectors.LeftClosestTo(form, target);

            var index = Array.IndexOf(eigenvalues, eigenvalue);
            Complex.Abs(eigenvalue - target).Should().Be(eigenvalues.Min(value => Complex.Abs(value - target)));
            vector.Zip(all[index], (first, second) => Complex.Abs(first - second)).Should().OnlyContain(difference => difference < 1e-13);
        }
    }

    [Fact]
    public void A_form_that_has_not_converged_gives_no_vectors()
    {
        var form = RealSchurForm.Of(EigenCases.RandomStochastic(9, new Random(1)), 9, balance: false, sweepCap: 1, CancellationToken.None);

        form.Invoking(unfinished => SchurEigenvectors.Right(unfinished, CancellationToken.None)).Should().Throw<InvalidOperationException>();
        form.Invoking(unfinished => SchurEigenvectors.Left(unfinished, CancellationToken.None)).Should().Throw<InvalidOperationException>();
        form.Invoking(unfinished => SchurEigenvectors.LeftClosestTo(unfinished, 1)).Should().Throw<InvalidOperationException>();
    }

    [Fact]
    public void Canceled_vectors_stop()
    {
        var form = RealSchurForm.Of(EigenCases.Cycle(5), 5, balance: false, CancellationToken.None);
        var canceled = new CancellationToken(canceled: true);

        form.Invoking(ready => SchurEigenvectors.Right(ready, canceled)).Should().Throw<OperationCanceledException>();
        form.Invoking(ready => SchurEigenvectors.Left(ready, canceled)).Should().Throw<OperationCanceledException>();
    }

    private static double[] Stationary(double[] matrix, int order)
    {
        var form = RealSchurForm.Of(matrix, order, balance: false, CancellationToken.None);
        var (eigenvalue, vector) = SchurEigenvectors.LeftClosestTo(form, 1);

        Complex.Abs(eigenvalue - 1).Should().BeLessThan(1e-13);
        var sum = vector.Sum(entry => entry.Real);
        return [.. vector.Select(entry => entry.Real / sum)];
    }

    private static void ShouldBeClose(double[] computed, double[] expected, double tolerance) =>
        computed.Zip(expected, (first, second) => Math.Abs(first - second)).Should().OnlyContain(difference => difference <= tolerance);

    private static void ShouldBeNormalized(Complex[] vector)
    {
        Math.Sqrt(vector.Sum(entry => (entry.Real * entry.Real) + (entry.Imaginary * entry.Imaginary))).Should().BeApproximately(1, EigenChecks.Bound(vector.Length));
        var largest = vector.Max(Complex.Abs);
        vector.Should().Contain(entry => entry.Real >= largest * (1 - 1e-12) && Math.Abs(entry.Imaginary) <= 1e-15);
    }

    private static double[] Rescaled(Complex[] vector, int unit) => [.. vector.Select(entry => Math.Round(entry.Real / vector[unit].Real, 12))];

    private static double Binomial(int count, int chosen) => Enumerable.Range(1, chosen).Aggregate(1.0, (product, k) => product * (count - chosen + k) / k);
}
