using System.Numerics;
using Stochastic.Chains.Internal;

namespace Stochastic.Chains.Kernels;

/// <summary>
/// The real Schur form of a general real matrix, A = D Q T Qᵀ D⁻¹: T quasi-upper-triangular, with 1 × 1 blocks for real and 2 × 2
/// blocks for complex pairs of eigenvalues on its diagonal, Q orthogonal, D a diagonal of powers of two (the identity without
/// balancing). Hessenberg reduction followed by double-shift QR sweeps (Golub and Van Loan, Matrix Computations, 4th ed. 2013, chapter
/// 7; Peters and Wilkinson in Wilkinson and Reinsch 1971). O(n³), about 25 n³ flops; memory 2 n² doubles.
/// </summary>
/// <remarks>
/// Backward stable: T is exact for a matrix within a modest multiple of n u ‖A‖ of the balanced A. It always ends: after 10, 20, ...
/// sweeps without an eigenvalue the shifts are replaced by exceptional ones, and when 30 n sweeps are spent in total the form is
/// returned as far as it came, marked as not converged; the hard families of the tests take less than a third of that. Eigenvalues
/// beyond the range of a double become infinite, parts of T below it zero.
/// </remarks>
internal sealed class RealSchurForm
{
    private const int SweepsPerRow = 30;
    private const int PatienceSweeps = 10;
    private const double ExceptionalDiagonal = 0.75;
    private const double ExceptionalProduct = -0.4375;
    private const double UnitRoundoff = 1.1102230246251565e-16;

    // Far below roundoff of a matrix of size one, far above the end of the range.
    private const double Negligible = 1e-270;

    private RealSchurForm(double[] matrix, int order, int[]? exponents)
    {
        Quasitriangle = matrix;
        TransposedBasis = new double[matrix.Length];
        Order = order;
        BalancingExponents = exponents;
    }

    /// <summary>n.</summary>
    internal int Order { get; }

    /// <summary>T, row-major. Without convergence its leading rows are still in Hessenberg form.</summary>
    internal double[] Quasitriangle { get; }

    /// <summary>Qᵀ, row-major: row i is the i-th Schur vector.</summary>
    internal double[] TransposedBasis { get; }

    /// <summary>The exponents e of D = diag(2^e); null without balancing.</summary>
    internal int[]? BalancingExponents { get; }

    /// <summary>The sweeps spent.</summary>
    internal int Sweeps { get; private set; }

    /// <summary>How many leading rows of T are not split into blocks yet: 0 on convergence.</summary>
    internal int UnresolvedRows { get; private set; }

    /// <summary>Whether all of T is in Schur form.</summary>
    internal bool HasConverged => UnresolvedRows == 0;

    /// <summary>The form of a row-major n × n matrix, with at most 30 n sweeps.</summary>
    /// <param name="matrix">The matrix; not changed.</param>
    /// <param name="order">n, at least 1.</param>
    /// <param name="balance">Whether to scale rows and columns to like size first.</param>
    /// <param name="cancellation">Looked at in every step of the reduction and every sweep.</param>
    /// <exception cref="ArgumentException">The matrix is not square, or an entry is not finite.</exception>
    internal static RealSchurForm Of(ReadOnlySpan<double> matrix, int order, bool balance, CancellationToken cancellation) =>
        Of(matrix, order, balance, SweepsPerRow * order, cancellation);

    /// <inheritdoc cref="Of(ReadOnlySpan{double}, int, bool, CancellationToken)"/>
    internal static RealSchurForm Of(ReadOnlySpan<double> matrix, int order, bool balance, int sweepCap, CancellationToken cancellation)
    {
        var scaled = matrix.ToArray();
        var exponent = PowerOfTwoScale.Normalize(scaled, order);
        var form = new RealSchurForm(scaled, order, balance ? Balancing.Apply(scaled, order) : null);
        exponent += PowerOfTwoScale.Normalize(scaled, order);
        HessenbergForm.Reduce(scaled, order, form.TransposedBasis, cancellation);
        form.Iterate(sweepCap, cancellation);
        PowerOfTwoScale.Apply(scaled, exponent);
        return form;
    }

    /// <summary>Whether the row is the first of a 2 × 2 block.</summary>
    internal bool IsPairStart(int row) => row + 1 < Order && At(row + 1, row) != 0;

    /// <summary>The eigenvalues in the order of the diagonal of T; of a complex pair, the one above the real axis first.</summary>
    /// <exception cref="InvalidOperationException">The form has not converged.</exception>
    internal Complex[] Eigenvalues()
    {
        RequireConvergence();
        var eigenvalues = new Complex[Order];
        for (var row = 0; row < Order; row++)
        {
            if (IsPairStart(row))
            {
                eigenvalues[row] = DiagonalBlock.At(Quasitriangle, Order, row).UpperEigenvalue();
                eigenvalues[row + 1] = Complex.Conjugate(eigenvalues[row]);
                row++;
            }
            else
            {
                eigenvalues[row] = At(row, row);
            }
        }

        return eigenvalues;
    }

    /// <summary>Refuses a form that has not converged.</summary>
    internal void RequireConvergence()
    {
        if (!HasConverged)
        {
            throw new InvalidOperationException(Messages.SchurFormUnfinished(UnresolvedRows, Order, Sweeps));
        }
    }

    // Works on the last block that is not split yet, from the bottom up.
    private void Iterate(int sweepCap, CancellationToken cancellation)
    {
        var sweep = new FrancisSweep(Quasitriangle, TransposedBasis, Order);
        var last = Order - 1;
        var stalled = 0;
        while (last >= 0)
        {
            cancellation.ThrowIfCancellationRequested();
            var first = Deflate(last);
            if (first >= last - 1)
            {
                if (first < last)
                {
                    SplitIfReal(first);
                }

                last = first - 1;
                stalled = 0;
            }
            else if (Sweeps == sweepCap)
            {
                break;
            }
            else
            {
                Sweeps++;
                stalled++;
                RunSweep(sweep, first, last, isExceptional: stalled % PatienceSweeps == 0);
            }
        }

        UnresolvedRows = last + 1;
    }

    // Sets negligible subdiagonals to zero and returns the first row of the last unreduced block.
    private int Deflate(int last)
    {
        for (var row = last; row > 0; row--)
        {
            var neighbors = Math.Abs(At(row, row)) + Math.Abs(At(row - 1, row - 1));
            var threshold = Math.Max(Negligible, UnitRoundoff * (neighbors == 0 ? 1 : neighbors));
            if (Math.Abs(At(row, row - 1)) <= threshold)
            {
                At(row, row - 1) = 0;
                return row;
            }
        }

        return 0;
    }

    private void RunSweep(FrancisSweep sweep, int first, int last, bool isExceptional)
    {
        if (isExceptional)
        {
            // Wilkinson's choice: off the pattern that a periodic matrix reproduces for ever.
            var size = Math.Abs(At(last, last - 1)) + Math.Abs(At(last - 1, last - 2));
            var shift = At(last, last) + (ExceptionalDiagonal * size);
            sweep.Run(first, last, new DiagonalBlock(shift, ExceptionalProduct * size, size, shift));
        }
        else
        {
            sweep.Run(first, last, DiagonalBlock.At(Quasitriangle, Order, last - 1));
        }
    }

    // A 2 × 2 block with real eigenvalues is turned into two 1 × 1 blocks.
    private void SplitIfReal(int row)
    {
        if (!DiagonalBlock.At(Quasitriangle, Order, row).TryRealEigenvector(out var cosine, out var sine))
        {
            return;
        }

        PlaneRotation.OfRows(Quasitriangle.AsSpan(row * Order, 2 * Order), row, cosine, sine);
        PlaneRotation.OfColumns(Quasitriangle.AsSpan(0, (row + 2) * Order), Order, row, cosine, sine);
        PlaneRotation.OfRows(TransposedBasis.AsSpan(row * Order, 2 * Order), 0, cosine, sine);
        At(row + 1, row) = 0;
    }

    private ref double At(int row, int column) => ref Quasitriangle[(row * Order) + column];
}
