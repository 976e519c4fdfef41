using System.Numerics;

namespace Stochastic.Chains.Kernels;

/// <summary>
/// Right and left eigenvectors of a general real matrix from its real Schur form: those of T by substitution, turned back by Q and the
/// balancing (Golub and Van Loan, Matrix Computations, 4th ed. 2013, section 7.6).
/// </summary>
/// <remarks>
/// A right vector x solves A x = λ x; a left vector y solves yᵀ A = λ yᵀ, not conjugated, so that it is a plain row beside A. Vector k
/// belongs to eigenvalue k of <see cref="RealSchurForm.Eigenvalues"/>; vectors of a complex pair are each other's conjugates. Each has
/// 2-norm one and its first largest entry real and positive, up to roundoff. Left and right vectors of different eigenvalues are orthogonal, and
/// |yᵀ x| of one eigenvalue is the reciprocal of its condition number (Wilkinson 1965): near zero it is all but defective.
/// </remarks>
internal static class SchurEigenvectors
{
    /// <summary>All right eigenvectors, one array each. O(n³): about 4/3 n³ flops.</summary>
    internal static Complex[][] Right(RealSchurForm form, CancellationToken cancellation) => All(form, isLeft: false, cancellation);

    /// <summary>All left eigenvectors, one array each. O(n³): about 4/3 n³ flops.</summary>
    internal static Complex[][] Left(RealSchurForm form, CancellationToken cancellation) => All(form, isLeft: true, cancellation);

    /// <summary>The eigenvalue closest to a real number, the first of equals, and its left eigenvector alone. O(n²).</summary>
    internal static (Complex Eigenvalue, Complex[] Vector) LeftClosestTo(RealSchurForm form, double target)
    {
        var eigenvalues = form.Eigenvalues();
        var closest = 0;
        for (var index = 1; index < eigenvalues.Length; index++)
        {
            if (Complex.Abs(eigenvalues[index] - target) < Complex.Abs(eigenvalues[closest] - target))
            {
                closest = index;
            }
        }

        var order = form.Order;
        var (real, imaginary) = (new double[order], new double[order]);
        var (turnedReal, turnedImaginary) = (new double[order], new double[order]);
        var matrix = ScaledQuasitriangle(form, out var exponent);
        Substitute(matrix, closest, Scaled(eigenvalues[closest], -exponent), isLeft: true, real, imaginary);
        RowCombinations.OfOne(real, form.TransposedBasis, turnedReal);
        RowCombinations.OfOne(imaginary, form.TransposedBasis, turnedImaginary);
        return (eigenvalues[closest], Eigenvector(form, isLeft: true, turnedReal, turnedImaginary));
    }

    private static Complex[][] All(RealSchurForm form, bool isLeft, CancellationToken cancellation)
    {
        // A row of the tables for each real vector, two for real and imaginary parts of a complex pair.
        var order = form.Order;
        var eigenvalues = form.Eigenvalues();
        var matrix = ScaledQuasitriangle(form, out var exponent);
        var substituted = new double[matrix.Length];
        var unused = new double[order];
        for (var row = 0; row < order; row++)
        {
            cancellation.ThrowIfCancellationRequested();
            var isPair = form.IsPairStart(row);
            var imaginary = isPair ? substituted.AsSpan((row + 1) * order, order) : unused;
            Substitute(matrix, row, Scaled(eigenvalues[row], -exponent), isLeft, substituted.AsSpan(row * order, order), imaginary);
            row += isPair ? 1 : 0;
        }

        var turned = new double[matrix.Length];
        RowCombinations.OfMany(substituted, form.TransposedBasis, order, turned);
        var vectors = new Complex[order][];
        for (var row = 0; row < order; row++)
        {
            var isPair = form.IsPairStart(row);
            var imaginary = isPair ? turned.AsSpan((row + 1) * order, order) : unused;
            vectors[row] = Eigenvector(form, isLeft, turned.AsSpan(row * order, order), imaginary);
            if (isPair)
            {
                vectors[row + 1] = Array.ConvertAll(vectors[row], Complex.Conjugate);
                row++;
            }
        }

        return vectors;
    }

    private static void Substitute(
        ReadOnlySpan<double> matrix, int block, Complex eigenvalue, bool isLeft, Span<double> real, Span<double> imaginary)
    {
        var solve = new QuasitriangularVector(matrix, real.Length, block, eigenvalue, real, imaginary);
        if (isLeft)
        {
            solve.SolveLeft();
        }
        else
        {
            solve.SolveRight();
        }
    }

    // Undoes the balancing, x = D v and yᵀ = vᵀ D⁻¹, and normalizes.
    private static Complex[] Eigenvector(RealSchurForm form, bool isLeft, Span<double> real, Span<double> imaginary)
    {
        if (form.BalancingExponents is { } exponents)
        {
            var sign = isLeft ? -1 : 1;
            var largest = int.MinValue;
            for (var row = 0; row < exponents.Length; row++)
            {
                var size = Math.Max(Math.Abs(real[row]), Math.Abs(imaginary[row]));
                largest = size == 0 ? largest : Math.Max(largest, Math.ILogB(size) + (sign * exponents[row]));
            }

            for (var row = 0; row < exponents.Length; row++)
            {
                real[row] = Math.ScaleB(real[row], (sign * exponents[row]) - largest);
                imaginary[row] = Math.ScaleB(imaginary[row], (sign * exponents[row]) - largest);
            }
        }

        var norm = Math.Sqrt(VectorLoops.Dot(real, real) + VectorLoops.Dot(imaginary, imaginary));
        var turn = ConjugatePhase(real, imaginary) / norm;
        var vector = new Complex[real.Length];
        for (var row = 0; row < vector.Length; row++)
        {
            vector[row] = new Complex(real[row], imaginary[row]) * turn;
        }

        return vector;
    }

    // The factor of magnitude one that makes the first largest entry real and positive.
    private static Complex ConjugatePhase(ReadOnlySpan<double> real, ReadOnlySpan<double> imaginary)
    {
        var largest = Complex.Zero;
        var size = 0.0;
        for (var row = 0; row < real.Length; row++)
        {
            var entry = new Complex(real[row], imaginary[row]);
            var magnitude = Complex.Abs(entry);
            (largest, size) = magnitude > size ? (entry, magnitude) : (largest, size);
        }

        return Complex.Conjugate(largest) / size;
    }

    private static double[] ScaledQuasitriangle(RealSchurForm form, out int exponent)
    {
        var matrix = form.Quasitriangle.AsSpan().ToArray();
        exponent = PowerOfTwoScale.Normalize(matrix, form.Order);
        return matrix;
    }

    private static Complex Scaled(Complex value, int exponent) => new(Math.ScaleB(value.Real, exponent), Math.ScaleB(value.Imaginary, exponent));
}
