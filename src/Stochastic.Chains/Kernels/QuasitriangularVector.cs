using System.Numerics;

namespace Stochastic.Chains.Kernels;

/// <summary>
/// One eigenvector of a quasi-upper-triangular matrix T of size about one, by substitution, block by block (Peters and Wilkinson in
/// Wilkinson and Reinsch 1971; Golub and Van Loan, Matrix Computations, 4th ed. 2013, section 7.6). O(n²).
/// </summary>
/// <remarks>
/// Where another eigenvalue lies within roundoff of this one, the pivot is replaced by roundoff, a relative perturbation of T that
/// leaves the residual small: a defective matrix then gives nearly parallel vectors. Before an entry would leave the range, the whole
/// vector is scaled down. Entries below the range become zero.
/// </remarks>
/// <param name="matrix">T, row-major.</param>
/// <param name="order">n.</param>
/// <param name="block">The first row of the block of the eigenvalue.</param>
/// <param name="eigenvalue">The eigenvalue; of a complex pair, the one above the real axis.</param>
/// <param name="real">Takes the real parts of the vector, largest magnitude about one; entries that are zero for structure are zero.</param>
/// <param name="imaginary">Takes the imaginary parts; zeros for a real eigenvalue.</param>
internal readonly ref struct QuasitriangularVector(
    ReadOnlySpan<double> matrix, int order, int block, Complex eigenvalue, Span<double> real, Span<double> imaginary)
{
    private const double UnitRoundoff = 1.1102230246251565e-16;
    private const double SmallestPivot = 1e-270;
    private const double LargestEntry = 1e270;

    private readonly ReadOnlySpan<double> _matrix = matrix;
    private readonly Span<double> _real = real;
    private readonly Span<double> _imaginary = imaginary;
    private readonly bool _isComplex = eigenvalue.Imaginary != 0;
    private readonly double _smallestPivot = Math.Max(SmallestPivot, UnitRoundoff * Magnitude(eigenvalue));

    private bool IsPair(int row) => row >= 0 && row + 1 < order && At(row + 1, row) != 0;

    /// <summary>Solves T x = λ x, from the block upwards.</summary>
    internal void SolveRight()
    {
        var end = Start(isTransposed: false);
        for (var row = block - 1; row >= 0; row--)
        {
            var isPair = IsPair(row - 1);
            SetToDot(row, row + 1, end);
            if (isPair)
            {
                row--;
                SetToDot(row, row + 2, end);
                SolvePair(row, Shifted(row), At(row, row + 1), At(row + 1, row), Shifted(row + 1));
            }
            else
            {
                DivideBy(row, Shifted(row));
            }
        }

        Normalize();
    }

    /// <summary>Solves yᵀ T = λ yᵀ (not conjugated), from the block downwards.</summary>
    internal void SolveLeft()
    {
        var row = Start(isTransposed: true);
        for (var done = block; done < row; done++)
        {
            SubtractRow(done, row);
        }

        while (row < order)
        {
            var isPair = IsPair(row);
            if (isPair)
            {
                SolvePair(row, Shifted(row), At(row + 1, row), At(row, row + 1), Shifted(row + 1));
                SubtractRow(row, row + 2);
                SubtractRow(row + 1, row + 2);
                row += 2;
            }
            else
            {
                DivideBy(row, Shifted(row));
                SubtractRow(row, row + 1);
                row++;
            }
        }

        Normalize();
    }

    // Sets the entries of the block itself and returns the row after it.
    private int Start(bool isTransposed)
    {
        _real.Clear();
        _imaginary.Clear();
        if (!_isComplex)
        {
            _real[block] = 1;
            return block + 1;
        }

        var (upper, lower) = isTransposed ? (At(block + 1, block), At(block, block + 1)) : (At(block, block + 1), At(block + 1, block));
        var isUpperLarger = Math.Abs(upper) >= Math.Abs(lower);
        var size = isUpperLarger ? Math.Abs(upper) : Math.Abs(lower);
        var first = isUpperLarger ? upper / size : -Shifted(block + 1) / size;
        var second = isUpperLarger ? -Shifted(block) / size : lower / size;
        (_real[block], _imaginary[block]) = (first.Real, first.Imaginary);
        (_real[block + 1], _imaginary[block + 1]) = (second.Real, second.Imaginary);
        return block + 2;
    }

    private void SetToDot(int row, int from, int end)
    {
        var entries = _matrix.Slice((row * order) + from, end - from);
        _real[row] = -VectorLoops.Dot(entries, _real[from..end]);
        if (_isComplex)
        {
            _imaginary[row] = -VectorLoops.Dot(entries, _imaginary[from..end]);
        }
    }

    private void SubtractRow(int row, int from)
    {
        var entries = _matrix.Slice((row * order) + from, order - from);
        VectorLoops.AddScaled(-_real[row], entries, _real[from..]);
        if (_isComplex)
        {
            VectorLoops.AddScaled(-_imaginary[row], entries, _imaginary[from..]);
        }
    }

    // Solves (a, b; c, d) for the two entries from a row on, by elimination with row exchange.
    private void SolvePair(int row, Complex a, Complex b, Complex c, Complex d)
    {
        if (Magnitude(c) > Magnitude(a))
        {
            (a, b, c, d) = (c, d, a, b);
            (_real[row], _real[row + 1]) = (_real[row + 1], _real[row]);
            (_imaginary[row], _imaginary[row + 1]) = (_imaginary[row + 1], _imaginary[row]);
        }

        a = AtLeastSmallest(a);
        var factor = c / a;
        Subtract(row + 1, factor * Entry(row));
        DivideBy(row + 1, d - (factor * b));
        Subtract(row, b * Entry(row + 1));
        DivideBy(row, a);
    }

    private void DivideBy(int row, Complex pivot)
    {
        pivot = AtLeastSmallest(pivot);
        var size = Math.Max(Math.Abs(_real[row]), Math.Abs(_imaginary[row]));
        if (size > Math.Min(1, Magnitude(pivot)) * LargestEntry)
        {
            VectorLoops.Divide(_real, size, _real);
            VectorLoops.Divide(_imaginary, size, _imaginary);
        }

        if (_isComplex)
        {
            var quotient = Entry(row) / pivot;
            (_real[row], _imaginary[row]) = (quotient.Real, quotient.Imaginary);
        }
        else
        {
            _real[row] /= pivot.Real;
        }
    }

    private void Normalize()
    {
        var largest = 0.0;
        for (var row = 0; row < order; row++)
        {
            largest = Math.Max(largest, Math.Max(Math.Abs(_real[row]), Math.Abs(_imaginary[row])));
        }

        VectorLoops.Divide(_real, largest, _real);
        VectorLoops.Divide(_imaginary, largest, _imaginary);
    }

    private void Subtract(int row, Complex value)
    {
        _real[row] -= value.Real;
        _imaginary[row] -= value.Imaginary;
    }

    private Complex AtLeastSmallest(Complex pivot) => Magnitude(pivot) < _smallestPivot ? _smallestPivot : pivot;

    private Complex Entry(int row) => new(_real[row], _imaginary[row]);

    private Complex Shifted(int row) => At(row, row) - eigenvalue;

    private double At(int row, int column) => _matrix[(row * order) + column];

    private static double Magnitude(Complex value) => Math.Abs(value.Real) + Math.Abs(value.Imaginary);
}
