namespace Stochastic.Chains.Kernels;

/// <summary>
/// Eigenvalues and orthonormal eigenvectors of a real symmetric matrix: Householder reduction to tridiagonal form, then implicit QL sweeps
/// (Bowdler, Martin, Reinsch and Wilkinson 1968; Golub and Van Loan, Matrix Computations, 4th ed. 2013, section 8.3). O(n³).
/// </summary>
/// <remarks>
/// Backward stable: exact for a matrix within a modest multiple of n u ‖A‖. It always ends: 60 sweeps for one eigenvalue are refused as
/// not converged, where two or three are usual.
/// </remarks>
internal sealed class SymmetricForm
{
    private const int MostSweeps = 60;
    private const double UnitRoundoff = 1.1102230246251565e-16;

    // Of the largest entry: far below its roundoff.
    private const double Negligible = 1e-20;

    private readonly double[] _couplings;
    private readonly double _negligible;

    private SymmetricForm(double[] matrix, int order, CancellationToken cancellation)
    {
        TransposedBasis = new double[matrix.Length];
        HessenbergForm.Reduce(matrix, order, TransposedBasis, cancellation);
        Eigenvalues = new double[order];
        _couplings = new double[order];
        for (var row = 0; row < order; row++)
        {
            Eigenvalues[row] = matrix[(row * order) + row];
            _couplings[row] = row + 1 < order ? matrix[((row + 1) * order) + row] : 0;
            _negligible = Math.Max(_negligible, Negligible * Math.Max(Math.Abs(Eigenvalues[row]), Math.Abs(_couplings[row])));
        }
    }

    /// <summary>The eigenvalues, in no order.</summary>
    internal double[] Eigenvalues { get; }

    /// <summary>Row k is the eigenvector of eigenvalue k, of length one.</summary>
    internal double[] TransposedBasis { get; }

    /// <summary>Whether all eigenvalues separated.</summary>
    internal bool HasConverged { get; private set; }

    /// <summary>The sweeps spent.</summary>
    internal int Sweeps { get; private set; }

    /// <summary>The form of a row-major symmetric matrix, which is overwritten.</summary>
    /// <exception cref="OperationCanceledException">Cancellation was requested; looked at in every step of the reduction and every sweep.</exception>
    internal static SymmetricForm Of(double[] matrix, int order, CancellationToken cancellation)
    {
        var form = new SymmetricForm(matrix, order, cancellation);
        form.Iterate(cancellation);
        return form;
    }

    private void Iterate(CancellationToken cancellation)
    {
        for (var first = 0; first < Eigenvalues.Length; first++)
        {
            var spent = 0;
            for (var last = EndOfBlock(first); last > first; last = EndOfBlock(first))
            {
                cancellation.ThrowIfCancellationRequested();
                if (spent++ == MostSweeps)
                {
                    return;
                }

                Sweeps++;
                Sweep(first, last);
            }
        }

        HasConverged = true;
    }

    /// <summary>The last row of the block that begins here, up to the first coupling that is negligible.</summary>
    private int EndOfBlock(int first)
    {
        var last = first;
        while (last + 1 < Eigenvalues.Length
            && Math.Abs(_couplings[last]) > Math.Max(_negligible, UnitRoundoff * (Math.Abs(Eigenvalues[last]) + Math.Abs(Eigenvalues[last + 1]))))
        {
            last++;
        }

        return last;
    }

    private void Sweep(int first, int last)
    {
        var half = (Eigenvalues[first + 1] - Eigenvalues[first]) / (2 * _couplings[first]);
        var shifted = Eigenvalues[last] - Eigenvalues[first] + (_couplings[first] / (half + Math.CopySign(double.Hypot(half, 1), half)));
        var (cosine, sine, moved) = (1.0, 1.0, 0.0);
        for (var row = last - 1; row >= first; row--)
        {
            var bulge = sine * _couplings[row];
            var kept = cosine * _couplings[row];
            var length = double.Hypot(bulge, shifted);
            _couplings[row + 1] = length;
            if (length == 0)
            {
                // The block splits here by itself.
                Eigenvalues[row + 1] -= moved;
                _couplings[last] = 0;
                return;
            }

            (sine, cosine) = (bulge / length, shifted / length);
            var corner = Eigenvalues[row + 1] - moved;
            var change = ((Eigenvalues[row] - corner) * sine) + (2 * cosine * kept);
            moved = sine * change;
            Eigenvalues[row + 1] = corner + moved;
            shifted = (cosine * change) - kept;
            var order = Eigenvalues.Length;
            PlaneRotation.OfRows(TransposedBasis.AsSpan(row * order, 2 * order), 0, cosine, -sine);
        }

        Eigenvalues[first] -= moved;
        _couplings[first] = shifted;
        _couplings[last] = 0;
    }
}
