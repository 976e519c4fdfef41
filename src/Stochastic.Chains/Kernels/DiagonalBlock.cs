using System.Numerics;

namespace Stochastic.Chains.Kernels;

/// <summary>
/// The 2 × 2 block (a, b; c, d), c ≠ 0, on the diagonal of a quasi-triangular matrix. With p = (a − d)/2 its eigenvalues are
/// (a + d)/2 ± √(p² + b c); the root is formed from factors, so that nothing under- or overflows and its error is that of a
/// relative change of b c by a few units of roundoff.
/// </summary>
internal readonly record struct DiagonalBlock(double A, double B, double C, double D)
{
    private double HalfGap => (A - D) / 2;

    /// <summary>The block at this place of a row-major matrix.</summary>
    internal static DiagonalBlock At(ReadOnlySpan<double> matrix, int order, int index)
    {
        var upper = matrix.Slice((index * order) + index, 2);
        var lower = matrix.Slice(((index + 1) * order) + index, 2);
        return new DiagonalBlock(upper[0], upper[1], lower[0], lower[1]);
    }

    /// <summary>Of the complex pair of eigenvalues of a block that is not split, the one above the real axis.</summary>
    internal Complex UpperEigenvalue() => new(D + HalfGap, Root(out _));

    /// <summary>
    /// Where the eigenvalues are real: a unit eigenvector (cosine, sine). Turned by it, the block is upper triangular.
    /// </summary>
    internal bool TryRealEigenvector(out double cosine, out double sine)
    {
        (cosine, sine) = (1, 0);
        var root = Root(out var isReal);
        if (!isReal)
        {
            return false;
        }

        // (λ − d, c) for the eigenvalue λ farther from d: the sum adds magnitudes.
        var gap = HalfGap + Math.CopySign(root, HalfGap);
        var length = double.Hypot(gap, C);
        (cosine, sine) = (gap / length, C / length);
        return true;
    }

    private double Root(out bool isReal)
    {
        var gap = Math.Abs(HalfGap);
        var coupling = Math.Sqrt(Math.Abs(B)) * Math.Sqrt(Math.Abs(C));
        var isPositive = B == 0 || (B > 0) == (C > 0);
        isReal = isPositive || gap >= coupling;
        return isPositive ? double.Hypot(gap, coupling) : Math.Sqrt(Math.Abs(gap - coupling)) * Math.Sqrt(gap + coupling);
    }
}
