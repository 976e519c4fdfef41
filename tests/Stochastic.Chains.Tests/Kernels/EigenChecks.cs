using System.Numerics;
using Stochastic.Chains.Kernels;

namespace Stochastic.Chains.Tests.Kernels;

/// <summary>Residuals of decompositions, each relative to the size of the matrix, and the one bound they are held to.</summary>
internal static class EigenChecks
{
    private const double UnitRoundoff = 1.1102230246251565e-16;

    /// <summary>
    /// Ten n u, in the Frobenius norm. The theory promises a modest polynomial of n times u (Golub and Van Loan 2013, sections 7.4.1 and
    /// 7.5.6); the factor ten is common practice, no source.
    /// </summary>
    internal static double Bound(int order) => 10 * order * UnitRoundoff;

    /// <summary>The Frobenius norm, safe from overflow; 1 for the zero matrix, so that it can divide.</summary>
    internal static double Norm(IReadOnlyList<double> matrix)
    {
        var largest = matrix.Max(Math.Abs);
        return largest == 0 ? 1 : largest * Math.Sqrt(matrix.Sum(entry => entry / largest * (entry / largest)));
    }

    /// <summary>‖Qᵀ A − T Qᵀ‖ / ‖A‖.</summary>
    internal static double FactorizationError(double[] matrix, double[] basis, double[] factor, int order)
    {
        var norm = Norm(matrix);
        var (left, right) = (Product(basis, Scaled(matrix, norm), order), Product(Scaled(factor, norm), basis, order));
        return Length(left.Zip(right, (first, second) => first - second));
    }

    /// <summary>‖Qᵀ Q − I‖.</summary>
    internal static double OrthogonalityError(double[] basis, int order)
    {
        var gram = Product(basis, EigenCases.Table(order, (row, column) => basis[(column * order) + row]), order);
        return Length(gram.Select((entry, index) => entry - (index / order == index % order ? 1 : 0)));
    }

    /// <summary>‖A x − λ x‖ / (‖A‖ ‖x‖), or of the row yᵀ with isLeft.</summary>
    internal static double Residual(double[] matrix, Complex eigenvalue, Complex[] vector, bool isLeft)
    {
        var order = vector.Length;
        var norm = Norm(matrix);
        var errors = Enumerable.Range(0, order).Select(row =>
        {
            var sum = -eigenvalue / norm * vector[row];
            for (var index = 0; index < order; index++)
            {
                sum += matrix[isLeft ? (index * order) + row : (row * order) + index] / norm * vector[index];
            }

            return Complex.Abs(sum);
        });
        return Length(errors) / Length(vector.Select(Complex.Abs));
    }

    /// <summary>The largest distance when each expected value takes the nearest computed one that is still free.</summary>
    internal static double LargestMismatch(IReadOnlyCollection<Complex> computed, IReadOnlyCollection<Complex> expected)
    {
        computed.Should().HaveSameCount(expected);
        var free = computed.ToList();
        return expected.Max(value =>
        {
            var nearest = free.MinBy(candidate => Complex.Abs(candidate - value));
            free.Remove(nearest);
            return Complex.Abs(nearest - value);
        });
    }

    internal static Complex[] Eigenvalues(double[] matrix, int order, bool balance = false) =>
        RealSchurForm.Of(matrix, order, balance, CancellationToken.None).Eigenvalues();

    internal static Complex Product(Complex[] left, Complex[] right) =>
        left.Zip(right, (first, second) => first * second).Aggregate(Complex.Zero, (sum, term) => sum + term);

    internal static double[] Product(double[] left, double[] right, int order) => EigenCases.Table(order, (row, column) =>
    {
        var sum = 0.0;
        for (var index = 0; index < order; index++)
        {
            sum += left[(row * order) + index] * right[(index * order) + column];
        }

        return sum;
    });

    private static double[] Scaled(double[] matrix, double norm) => [.. matrix.Select(entry => entry / norm)];

    private static double Length(IEnumerable<double> entries) => Math.Sqrt(entries.Sum(entry => entry * entry));
}
