using System.Numerics;
using Stochastic.Chains.Kernels;

namespace Stochastic.Chains.Steps;

/// <summary>How far powers through computed factors V, Λ, W can be off, from residuals computed once.</summary>
/// <remarks>
/// <para>
/// Let M = V Λ V⁻¹ exactly, R = P V − V Λ and G = W V − I, all with bounds on the rounding of computing them. Then
/// Pⁿ − Mⁿ = Σ_k Pⁿ⁻¹⁻ᵏ R Λᵏ V⁻¹. Powers of P average, so an entry of column l is at most Σ_j ρ_j h_j |V⁻¹_jl| with ρ_j the largest modulus
/// in column j of R and h_j = Σ_k |λ_j|ᵏ ≤ min(n, 1/(1 − |λ_j|)). A right vector of ones for the eigenvalue one has ρ = 0.
/// </para>
/// <para>
/// Since V⁻¹ = (I + G)⁻¹ W, Mⁿ differs from V Λⁿ W by V Λⁿ G (I + G)⁻¹ W: at most Σ_j |λ_j|ⁿ T_jl, where T bounds |G (I + G)⁻¹ W|.
/// Rounding Λⁿ and the products adds multiples of |λ_j|ⁿ |W_jl|. Every step holds for any V and W; nothing is proved when ‖G‖ is not below
/// one half.
/// </para>
/// </remarks>
internal sealed class SpectralBound
{
    private const double UnitRoundoff = 1.0 / (1L << 53);
    private const double SecondOrder = 1.01;
    private const double LargestDefect = 0.5;

    private readonly SpectralFactors _factors;
    private readonly double[] _residuals;
    private readonly double[] _defects;
    private readonly double[] _inverse;
    private readonly double[] _moduli;

    private SpectralBound(SpectralFactors factors, double[] residuals, double[] defects, double[] inverse)
    {
        _factors = factors;
        _residuals = residuals;
        _defects = defects;
        _inverse = inverse;
        _moduli = Array.ConvertAll(factors.Eigenvalues, value => IsUnit(value) ? 1 : Complex.Abs(value) * (1 + (4 * UnitRoundoff)));
    }

    /// <summary>The largest entry of |P V − V Λ| for each column, as computed.</summary>
    internal static double[] Residuals(SpectralFactors factors, double[] step, WorkSharing sharing)
    {
        var order = factors.Order;
        var images = SpectralTables.Product(step, factors.Right, order, sharing);
        var row = new double[order];
        var residuals = new double[order];
        for (var state = 0; state < order; state++)
        {
            factors.MultiplyRight(factors.Eigenvalues, factors.Right.AsSpan(state * order, order), row);
            for (var index = 0; index < order; index++)
            {
                var isPair = factors.IsPairStart(index);
                var real = images[(state * order) + index] - row[index];
                var imaginary = isPair ? images[(state * order) + index + 1] - row[index + 1] : 0;
                residuals[index] = Math.Max(residuals[index], double.Hypot(real, imaginary));
                if (isPair)
                {
                    residuals[++index] = residuals[index - 1];
                }
            }
        }

        return residuals;
    }

    /// <summary>The bound, or null where nothing can be proved.</summary>
    /// <param name="factors">V, Λ and W.</param>
    /// <param name="residuals">The computed residuals.</param>
    /// <param name="stepRoundings">By how many roundings an entry of the step matrix is off.</param>
    /// <param name="hasOnes">Whether the first right vector is exactly one everywhere, for the eigenvalue one.</param>
    /// <param name="sharing">Threads and cancellation.</param>
    internal static SpectralBound? Of(SpectralFactors factors, double[] residuals, double stepRoundings, bool hasOnes, WorkSharing sharing)
    {
        var order = factors.Order;
        var left = Array.ConvertAll(factors.Left, Math.Abs);
        var right = Array.ConvertAll(factors.Right, Math.Abs);
        var defect = SpectralTables.Product(factors.Left, factors.Right, order, sharing);
        var sizes = SpectralTables.Product(left, right, order, sharing);
        var rowSums = new double[order];
        for (var index = 0; index < defect.Length; index++)
        {
            var (row, column) = (index / order, index % order);
            var size = Math.Abs(row == column ? defect[index] - 1 : defect[index]) + (((2.0 * order) + 6) * UnitRoundoff * (sizes[index] + 1));
            defect[index] = SecondOrder * size;
            rowSums[row] += defect[index];
        }

        var largest = SecondOrder * rowSums.Max();
        if (!(largest < LargestDefect))
        {
            return null;
        }

        var defects = SpectralTables.Product(defect, left, order, sharing);
        var columnMaxima = ColumnMaxima(left, order);
        var inverse = left;
        for (var index = 0; index < defects.Length; index++)
        {
            var higher = rowSums[index / order] * largest / (1 - largest) * columnMaxima[index % order];
            defects[index] = SecondOrder * (defects[index] + higher);
            inverse[index] += defects[index];
        }

        var rounding = SecondOrder * UnitRoundoff * Math.Sqrt(2) * ((2.0 * order) + stepRoundings + 16);
        var bounded = Array.ConvertAll(residuals, residual => (SecondOrder * residual) + rounding);
        bounded[0] = hasOnes ? 0 : bounded[0];
        return new SpectralBound(factors, bounded, defects, inverse);
    }

    /// <summary>
    /// A bound on the distance of each eigenvalue of the chain from the nearest computed one: ‖V⁻¹ R‖ (Bauer and Fike 1960), the better of
    /// the row and the column norm.
    /// </summary>
    internal double OfEigenvalues()
    {
        var order = _factors.Order;
        var rowSums = Enumerable.Range(0, order).Select(row => _inverse.AsSpan(row * order, order).ToArray().Sum()).ToArray();
        return SecondOrder * Math.Min(rowSums.Max() * _residuals.Sum(), _residuals.Max() * rowSums.Sum());
    }

    /// <summary>The bound on the error of V Λⁿ W for each column.</summary>
    internal double[] OfColumns(long steps)
    {
        var order = _factors.Order;
        var bounds = new double[order];
        for (var index = 0; index < order; index++)
        {
            var eigenvalue = _factors.Eigenvalues[index];
            var modulus = _moduli[index];
            var power = modulus == 1 ? 1 : Math.Pow(modulus, steps) * (1 + 1e-10);
            var visits = modulus < 1 ? Math.Min(steps, 1 / (1 - modulus)) : steps * Math.Max(1, power);
            var isExactPower = IsUnit(eigenvalue) || eigenvalue == 0;
            var powerRoundings = isExactPower ? 0 : eigenvalue.Imaginary == 0 ? steps : 3.0 * steps;
            var rounding = (eigenvalue.Imaginary == 0 ? 1 : 2) * ((2.0 * order) + 16 + powerRoundings) * UnitRoundoff;
            AddScaled(SecondOrder * power, _defects.AsSpan(index * order, order), bounds);
            AddScaled(SecondOrder * _residuals[index] * visits, _inverse.AsSpan(index * order, order), bounds);
            AddScaled(SecondOrder * power * rounding, _inverse.AsSpan(index * order, order), bounds);
        }

        return bounds;
    }

    private static void AddScaled(double factor, ReadOnlySpan<double> source, double[] target)
    {
        if (factor > 0)
        {
            VectorLoops.AddScaled(factor, source, target);
        }
    }

    private static bool IsUnit(Complex value) => value.Imaginary == 0 && Math.Abs(value.Real) == 1;

    private static double[] ColumnMaxima(double[] table, int order)
    {
        var maxima = new double[order];
        for (var row = 0; row < order; row++)
        {
            VectorLoops.RaiseTo(table.AsSpan(row * order, order), maxima);
        }

        return maxima;
    }
}
