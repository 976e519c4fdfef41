using System.Numerics;
using Stochastic.Chains.Kernels;

namespace Stochastic.Chains.Tests.Kernels;

public class BalancingTests
{
    [Fact]
    public void The_balanced_matrix_is_similar_by_powers_of_two_exactly()
    {
        var matrix = BadlyScaled(12, 7);
        var balanced = matrix.ToArray();

        var exponents = Balancing.Apply(balanced, 12);

        exponents.Distinct().Should().HaveCountGreaterThan(6);
        balanced.Should().Equal(EigenCases.Table(12, (row, column) => Math.ScaleB(matrix[(row * 12) + column], exponents[column] - exponents[row])));
    }

    [Fact]
    public void Rows_and_columns_come_to_like_size()
    {
        var matrix = BadlyScaled(12, 7);

        Balancing.Apply(matrix, 12);

        for (var index = 0; index < 12; index++)
        {
            var others = Enumerable.Range(0, 12).Where(other => other != index).ToList();
            var ratio = others.Sum(other => Math.Abs(matrix[(index * 12) + other])) / others.Sum(other => Math.Abs(matrix[(other * 12) + index]));
            ratio.Should().BeInRange(0.25, 4, "a change by two would gain");
        }
    }

    [Fact]
    public void A_balanced_matrix_stays_as_it_is()
    {
        var matrix = EigenCases.CycleWalk(9);
        var copy = matrix.ToArray();

        Balancing.Apply(matrix, 9).Should().OnlyContain(exponent => exponent == 0);

        matrix.Should().Equal(copy);
    }

    [Fact]
    public void A_triangular_matrix_ends_with_bounded_exponents()
    {
        var matrix = EigenCases.Table(10, (row, column) => column > row ? 1 : 0);
        matrix[90] = 1e-250;

        Balancing.Apply(matrix, 10).Should().OnlyContain(exponent => Math.Abs(exponent) <= 400);

        matrix.Should().OnlyContain(entry => double.IsFinite(entry));
    }

    [Fact]
    public void Balancing_recovers_eigenvalues_that_bad_scaling_hides()
    {
        // D R D⁻¹ has the eigenvalues of R.
        var benign = EigenChecks.Eigenvalues(BadlyScaled(12, 0), 12);
        var matrix = BadlyScaled(12, 7);

        EigenChecks.LargestMismatch(EigenChecks.Eigenvalues(matrix, 12, balance: true), benign).Should().BeLessThan(1e-12);
        EigenChecks.LargestMismatch(EigenChecks.Eigenvalues(matrix, 12), benign).Should().BeGreaterThan(1e-9, "else the example shows nothing");
    }

    [Theory]
    [InlineData("Ehrenfest urn")]
    [InlineData("graded")]
    [InlineData("sparse stochastic")]
    [InlineData("reducible")]
    [InlineData("near the largest double")]
    public void Vectors_of_the_balanced_matrix_are_turned_back(string family)
    {
        foreach (var (name, order, matrix) in EigenCases.Of(family))
        {
            var form = RealSchurForm.Of(matrix, order, balance: true, CancellationToken.None);
            ShouldSolve(form, matrix, SchurEigenvectors.Right(form, CancellationToken.None), isLeft: false, name);
            ShouldSolve(form, matrix, SchurEigenvectors.Left(form, CancellationToken.None), isLeft: true, name);
        }
    }

    private static void ShouldSolve(RealSchurForm form, double[] matrix, Complex[][] vectors, bool isLeft, string name)
    {
        var eigenvalues = form.Eigenvalues();
        for (var index = 0; index < vectors.Length; index++)
        {
            EigenChecks.Residual(matrix, eigenvalues[index], vectors[index], isLeft)
                .Should().BeLessThanOrEqualTo(EigenChecks.Bound(form.Order), "vector {0} of {1}, order {2}", index, name, form.Order);
        }
    }

    private static double[] BadlyScaled(int order, int step)
    {
        var random = new Random(3);
        var exponents = EigenCases.Shuffled(order, random);
        return EigenCases.Table(order, (row, column) => Math.ScaleB(random.NextDouble() - 0.5, step * (exponents[row] - exponents[column])));
    }
}
