using Stochastic.Chains.Kernels;

namespace Stochastic.Chains.Tests.Kernels;

public class HessenbergFormTests
{
    public static TheoryData<string> Families => EigenCases.Names;

    [Theory]
    [MemberData(nameof(Families))]
    public void The_matrix_is_Q_H_Qᵀ_with_zeros_below_the_subdiagonal(string family)
    {
        foreach (var (name, order, matrix) in EigenCases.Of(family))
        {
            var (reduced, basis) = (matrix.ToArray(), new double[matrix.Length]);

            HessenbergForm.Reduce(reduced, order, basis, CancellationToken.None);

            EigenChecks.OrthogonalityError(basis, order).Should().BeLessThanOrEqualTo(EigenChecks.Bound(order), "{0}, order {1}", name, order);
            EigenChecks.FactorizationError(matrix, basis, reduced, order).Should().BeLessThanOrEqualTo(EigenChecks.Bound(order), "{0}, order {1}", name, order);
            for (var row = 2; row < order; row++)
            {
                reduced.AsSpan(row * order, row - 1).ContainsAnyExcept(0.0).Should().BeFalse();
            }
        }
    }

    [Fact]
    public void A_matrix_in_the_form_already_is_left_alone()
    {
        var matrix = EigenCases.Table(7, (row, column) => row <= column + 1 ? 1.0 + row + (column * column) : 0);
        var (reduced, basis) = (matrix.ToArray(), new double[49]);

        HessenbergForm.Reduce(reduced, 7, basis, CancellationToken.None);

        reduced.Should().Equal(matrix);
        basis.Should().Equal(EigenCases.Table(7, (row, column) => row == column ? 1 : 0));
    }
}
