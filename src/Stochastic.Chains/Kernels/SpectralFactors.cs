using System.Numerics;
using MathNet.Numerics.Providers.LinearAlgebra;

namespace Stochastic.Chains.Kernels;

/// <summary>
/// A spectral decomposition A = V Λ W, W = V⁻¹, in real arithmetic: a complex pair x ± i y of eigenvalues, upper one first, stands for the
/// block (x, y; −y, x), with the real and the imaginary part of the right vector of x + i y as its two columns of V.
/// </summary>
/// <param name="Eigenvalues">The eigenvalues.</param>
/// <param name="Right">V, row-major; each right vector has a largest entry of modulus one.</param>
/// <param name="Left">W, row-major.</param>
internal sealed record SpectralFactors(Complex[] Eigenvalues, double[] Right, double[] Left)
{
    private const double Nearby = 1e-12;

    /// <summary>The number of eigenvalues.</summary>
    internal int Order => Eigenvalues.Length;

    /// <summary>The factors of right vectors, whose inverse is taken.</summary>
    internal static SpectralFactors Of(IReadOnlyList<SpectralUnit> units)
    {
        var (eigenvalues, right) = Gather(units);
        var order = eigenvalues.Length;
        var left = right.ToArray();
        ManagedLinearAlgebraProvider.Instance.LUInverse(left, order);
        if (!left.All(double.IsFinite))
        {
            // Some vectors coincide: the chain has no full set of them. Those of a matrix near by stand in; no bound will hold for them.
            left = [.. right.Select((entry, index) => entry + (Nearby * Math.Sin(1 + (index / order) + (Math.Sqrt(2) * (index % order)))))];
            ManagedLinearAlgebraProvider.Instance.LUInverse(left, order);
        }

        return new SpectralFactors(eigenvalues, right, left);
    }

    /// <summary>The factors of real right vectors, given the rows of their inverse.</summary>
    internal static SpectralFactors Of(IReadOnlyList<SpectralUnit> units, IReadOnlyList<double[]> leftRows)
    {
        var (eigenvalues, right) = Gather(units);
        return new SpectralFactors(eigenvalues, right, [.. leftRows.SelectMany(row => row)]);
    }

    /// <summary>Whether an eigenvalue is the upper one of a complex pair.</summary>
    internal bool IsPairStart(int index) => Eigenvalues[index].Imaginary > 0;

    /// <summary>The right vector of an eigenvalue.</summary>
    internal Complex[] RightVector(int index)
    {
        var vector = new Complex[Order];
        var (start, sign) = Place(index);
        for (var row = 0; row < Order; row++)
        {
            vector[row] = new Complex(Right[(row * Order) + start], sign == 0 ? 0 : sign * Right[(row * Order) + start + 1]);
        }

        return vector;
    }

    /// <summary>The left vector of an eigenvalue: a row of the inverse of the matrix of right vectors.</summary>
    internal Complex[] LeftVector(int index)
    {
        var vector = new Complex[Order];
        var (start, sign) = Place(index);
        for (var column = 0; column < Order; column++)
        {
            var first = Left[(start * Order) + column];
            vector[column] = sign == 0 ? first : new Complex(first / 2, -sign * Left[((start + 1) * Order) + column] / 2);
        }

        return vector;
    }

    /// <summary>Multiplies a row vector or a table of rows from the right with the blocks of some eigenvalues: each row · Λ.</summary>
    internal void MultiplyRight(ReadOnlySpan<Complex> blocks, ReadOnlySpan<double> row, Span<double> target)
    {
        for (var index = 0; index < Order; index++)
        {
            if (IsPairStart(index))
            {
                var (real, imaginary) = (blocks[index].Real, blocks[index].Imaginary);
                target[index] = (row[index] * real) - (row[index + 1] * imaginary);
                target[index + 1] = (row[index] * imaginary) + (row[index + 1] * real);
                index++;
            }
            else
            {
                target[index] = row[index] * blocks[index].Real;
            }
        }
    }

    private static (Complex[] Eigenvalues, double[] Right) Gather(IReadOnlyList<SpectralUnit> units)
    {
        var order = units.Sum(unit => unit.Width);
        var eigenvalues = new Complex[order];
        var right = new double[order * order];
        var column = 0;
        foreach (var unit in units)
        {
            eigenvalues[column] = unit.Eigenvalue;
            for (var row = 0; row < order; row++)
            {
                right[(row * order) + column] = unit.Vector[row].Real;
            }

            if (unit.Width == 2)
            {
                eigenvalues[column + 1] = Complex.Conjugate(unit.Eigenvalue);
                for (var row = 0; row < order; row++)
                {
                    right[(row * order) + column + 1] = unit.Vector[row].Imaginary;
                }
            }

            column += unit.Width;
        }

        return (eigenvalues, right);
    }

    /// <summary>The first column of an eigenvalue, and the sign of its imaginary part.</summary>
    private (int Start, int Sign) Place(int index) =>
        Eigenvalues[index].Imaginary < 0 ? (index - 1, -1) : (index, Math.Sign(Eigenvalues[index].Imaginary));
}

/// <summary>A real eigenvalue, or the upper one of a complex pair, with its right vector.</summary>
internal readonly record struct SpectralUnit(Complex Eigenvalue, Complex[] Vector)
{
    /// <summary>The number of eigenvalues that it stands for.</summary>
    internal int Width => Eigenvalue.Imaginary > 0 ? 2 : 1;

    /// <summary>The same with the largest entry of the vector one.</summary>
    internal SpectralUnit Scaled()
    {
        var largest = Complex.Zero;
        foreach (var entry in Vector)
        {
            largest = Complex.Abs(entry) > Complex.Abs(largest) * (1 + 1e-12) ? entry : largest;
        }

        return this with { Vector = Array.ConvertAll(Vector, entry => entry / largest) };
    }
}
