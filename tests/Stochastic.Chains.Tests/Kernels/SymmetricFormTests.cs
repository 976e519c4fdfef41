using MathNet.Numerics.LinearAlgebra;
using Stochastic.Chains.Kernels;

namespace Stochastic.Chains.Tests.Kernels;

public class SymmetricFormTests
{
    [Theory]
    [InlineData(1)]
    [InlineData(2)]
    [InlineData(3)]
    [InlineData(24)]
    [InlineData(60)]
    public void Random_matrices_are_diagonalized_by_an_orthogonal_basis(int order)
    {
        var random = new Random(order);
        var upper = EigenCases.Table(order, (_, _) => random.NextDouble() - 0.5);
        Check(EigenCases.Table(order, (row, column) => upper[(row * order) + column] + upper[(column * order) + row]), order);
    }

    [Theory]
    [InlineData(9)]
    [InlineData(40)]
    public void Repeated_zero_and_graded_eigenvalues_are_found(int order)
    {
        Check(new double[order * order], order);
        Check(EigenCases.Table(order, (row, column) => row == column ? 1 : 0), order);
        Check(EigenCases.Table(order, (_, _) => 1.0 / order), order);
        Check(EigenCases.CycleWalk(order), order);
        Check(EigenCases.Table(order, (row, column) => Math.Pow(10, -3.0 * (row + column))), order);
    }

    private static void Check(double[] matrix, int order)
    {
        var form = SymmetricForm.Of([.. matrix], order, CancellationToken.None);

        form.HasConverged.Should().BeTrue();
        form.Sweeps.Should().BeLessThanOrEqualTo(5 * order);
        EigenChecks.OrthogonalityError(form.TransposedBasis, order).Should().BeLessThan(EigenChecks.Bound(order));
        var diagonal = EigenCases.Table(order, (row, column) => row == column ? form.Eigenvalues[row] : 0);
        EigenChecks.FactorizationError(matrix, form.TransposedBasis, diagonal, order).Should().BeLessThan(EigenChecks.Bound(order));
        var reference = Matrix<double>.Build.Dense(order, order, (row, column) => matrix[(row * order) + column]).Evd(Symmetricity.Symmetric);
        form.Eigenvalues.Order().Zip(reference.EigenValues.Select(value => value.Real).Order(), (first, second) => Math.Abs(first - second)).Max()
            .Should().BeLessThan(EigenChecks.Bound(order) * EigenChecks.Norm(matrix));
    }
}
