using System.Diagnostics;
using System.Globalization;
using System.Numerics;
using Stochastic.Chains.Internal;
using Stochastic.Chains.Kernels;
using Stochastic.Chains.Steps;

namespace Stochastic.Chains;

/// <summary>The eigenvalues of a chain's transition matrix with their right and left eigenvectors: P = V Λ V⁻¹.</summary>
/// <typeparam name="TState">The type of a state.</typeparam>
/// <remarks>
/// The residual of its certificate is the largest entry of |P V − V Λ|, re-computed, each right vector having a largest entry of one; its
/// absolute bound holds for eigenvalues: each one of the chain is that close to one of these. Powers made from it have certificates of their own.
/// Immutable and safe for concurrent use.
/// </remarks>
/// <example>
/// <code>
/// SpectralDecomposition&lt;string&gt; spectrum = chain.Spectrum();
/// double steps = spectrum.RelaxationTime;
/// NStepMatrix&lt;string&gt; year = spectrum.NStep(52), decade = spectrum.NStep(520);
/// </code>
/// </example>
[DebuggerDisplay("{ToString(),nq}")]
public sealed class SpectralDecomposition<TState> : ICertified
    where TState : notnull
{
    private const int MostShown = 8;
    private const double LargestCondition = 1e6;

    private readonly Chain<TState> _chain;
    private readonly double[] _step;
    private readonly SpectralFactors _factors;
    private readonly SpectralBound? _bound;
    private readonly SolveOptions _options;
    private readonly WorkSharing _sharing;

    internal SpectralDecomposition(
        Chain<TState> chain, double[] step, SpectralFactors factors, bool isSymmetric, SpectralBound? bound, Certificate certificate, SolveOptions options)
    {
        _chain = chain;
        _step = step;
        _factors = factors;
        _bound = bound;
        _options = options with { CancellationToken = CancellationToken.None, Progress = null }; // what is asked later is not cancelled with what was asked first
        _sharing = new WorkSharing(options.Parallelism, CancellationToken.None);
        Certificate = certificate;
        HasOrthogonalVectors = isSymmetric;
        Eigenvalues = Array.AsReadOnly(factors.Eigenvalues);
        RightVectors = Vectors(factors.RightVector);
        LeftVectors = Vectors(factors.LeftVector);
        ConditionNumber = RowNorm(RightVectors, isTransposed: true) * RowNorm(LeftVectors, isTransposed: false);
    }

    /// <summary>Gets the states, in the order of the entries of vectors.</summary>
    public StateSpace<TState> States => _chain.States;

    /// <summary>
    /// Gets the eigenvalues: those equal to one first, then by modulus, largest first; equal moduli (to about ten digits) by real part, then
    /// by imaginary part, largest first. Complex pairs stand side by side. The eigenvalues of modulus one are those that the structure of
    /// the chain demands: one for each recurrent class, and the other roots of one for a periodic class.
    /// </summary>
    public IReadOnlyList<Complex> Eigenvalues { get; }

    /// <summary>Gets the right eigenvectors (P v = λ v), in the order of the eigenvalues, each with a largest entry of one.</summary>
    public IReadOnlyList<Eigenvector<TState>> RightVectors { get; }

    /// <summary>
    /// Gets the left eigenvectors (w P = λ w), in the order of the eigenvalues. Scaled so that each times its right vector is one, and
    /// times any other zero: they are the rows of the inverse of the matrix of right vectors. With one recurrent class the first is the
    /// stationary distribution.
    /// </summary>
    public IReadOnlyList<Eigenvector<TState>> LeftVectors { get; }

    /// <summary>
    /// Gets whether the chain is reversible and without transient states, so that the symmetric matrix D^½ P D^−½ with D the long-run
    /// shares was decomposed: eigenvalues are real, and D^½ times the right vectors are orthogonal. Not done where the shares of a class
    /// differ by more than a factor of 10¹², which would cost their vectors too many digits.
    /// </summary>
    public bool HasOrthogonalVectors { get; }

    /// <summary>
    /// Gets the condition number of the matrix V of right eigenvectors in the norm of the largest row sum of moduli, ‖V‖ ‖V⁻¹‖, each
    /// column having a largest entry of one; computed from both matrices. Errors of powers through the spectrum grow with it.
    /// </summary>
    public double ConditionNumber { get; }

    /// <summary>
    /// Gets whether the matrix has a full set of eigenvectors as far as rounding lets one tell: the condition number is at most 10⁶, or
    /// the chain is reversible. Two eigenvalues that coincide without two vectors show as a condition number of 10⁷ or more, because rounding
    /// splits them by about 10⁻⁸.
    /// </summary>
    public bool IsDiagonalizable => HasOrthogonalVectors || ConditionNumber <= LargestCondition;

    /// <summary>Gets the second eigenvalue in the order above: of those beside one eigenvalue of one, the largest in modulus. Null for a single state.</summary>
    public Complex? SubdominantEigenvalue => Eigenvalues.Count > 1 ? Eigenvalues[1] : null;

    /// <summary>
    /// Gets the absolute spectral gap, one minus the modulus of the subdominant eigenvalue: 0 for a periodic chain or one with several
    /// recurrent classes, 1 for a single state.
    /// </summary>
    public double SpectralGap => Eigenvalues.Count == 1 ? 1
        : _chain.Structure().RecurrentClasses.Sum(group => group.Period) > 1 ? 0
        : 1 - Complex.Abs(Eigenvalues[1]);

    /// <summary>Gets the relaxation time in steps, one over the spectral gap; +∞ where the gap is 0.</summary>
    public double RelaxationTime => 1 / SpectralGap;

    /// <inheritdoc/>
    public Certificate Certificate { get; }

    /// <summary>Computes the n-step transition matrix from the spectrum.</summary>
    /// <param name="steps">The number of steps, 0 or more.</param>
    /// <returns>The matrix with a certificate of its own, at the level that the spectrum was asked with.</returns>
    /// <exception cref="ArgumentOutOfRangeException">The number of steps is negative.</exception>
    /// <remarks>One matrix multiplication, whatever the number of steps: O(states³).</remarks>
    /// <example><code>NStepMatrix&lt;string&gt; year = chain.Spectrum().NStep(52);</code></example>
    public NStepMatrix<TState> NStep(long steps)
    {
        RequireSteps(steps);
        return steps <= 1 ? _chain.NStep(steps, _options) : Power(steps, "Computed from the spectrum.");
    }

    /// <summary>Computes where things stand after some steps from one state.</summary>
    /// <param name="from">The state to start in.</param>
    /// <param name="steps">The number of steps, 0 or more.</param>
    /// <returns>The distribution with a certificate of its own.</returns>
    /// <exception cref="UnknownStateException">The label is none of the chain's states.</exception>
    /// <exception cref="ArgumentOutOfRangeException">The number of steps is negative.</exception>
    /// <remarks>One row only: O(states²), whatever the number of steps, once all states can be reached; O(states³ log n / 64) before.</remarks>
    /// <example><code>double washed = chain.Spectrum().NStep("dirty", 52)["clean"];</code></example>
    public StepDistribution<TState> NStep(TState from, long steps)
    {
        RequireSteps(steps);
        var row = States.Require(from);
        if (steps <= 1)
        {
            return _chain.StartingIn(from).After(steps, _options);
        }

        var possible = SpectralPossible.After(_chain, _step, steps, _options.CancellationToken);
        var values = SpectralPower.Row(_factors, SpectralPower.Powers(_factors.Eigenvalues, steps), row);
        return new StepDistribution<TState>(States, values, steps, Certify(values, steps, column => possible((row * values.Length) + column), "Computed from the spectrum."));
    }

    /// <summary>A short account of the spectrum, the same in every culture.</summary>
    public override string ToString()
    {
        var shown = string.Join("; ", Eigenvalues.Take(MostShown).Select(Write));
        var rest = Eigenvalues.Count > MostShown ? $" and {Text.Count(Eigenvalues.Count - MostShown)} more" : string.Empty;
        return $"{Text.Count(Eigenvalues.Count, "eigenvalue", "eigenvalues")}: {shown}{rest}; relaxation time {Text.Short(RelaxationTime)} steps";
    }

    /// <summary>A power of two steps or more.</summary>
    internal NStepMatrix<TState> Power(long steps, string reason)
    {
        var possible = SpectralPossible.After(_chain, _step, steps, _options.CancellationToken);
        var values = SpectralPower.Table(_factors, SpectralPower.Powers(_factors.Eigenvalues, steps), _sharing);
        return new NStepMatrix<TState>(States, values, steps, Certify(values, steps, possible, reason));
    }

    private static void RequireSteps(long steps)
    {
        if (steps < 0)
        {
            throw new ArgumentOutOfRangeException(nameof(steps), steps, Messages.NegativeSteps(steps));
        }
    }

    private static string Write(Complex value) => value.Imaginary == 0
        ? value.Real.ToString("G6", CultureInfo.InvariantCulture)
        : string.Create(CultureInfo.InvariantCulture, $"{value.Real:G6} {(value.Imaginary < 0 ? '−' : '+')} {Math.Abs(value.Imaginary):G6}i");

    private static double RowNorm(IReadOnlyList<Eigenvector<TState>> vectors, bool isTransposed)
    {
        var sums = new double[vectors.Count];
        for (var index = 0; index < sums.Length; index++)
        {
            var values = vectors[index].Values;
            for (var state = 0; state < values.Length; state++)
            {
                sums[isTransposed ? state : index] += Complex.Abs(values[state]);
            }
        }

        return sums.Max();
    }

    private Certificate Certify(double[] values, long steps, Func<int, bool> isPossible, string reason)
    {
        var states = States.Count;
        var correction = SpectralPower.MakeProbabilities(values, states, isPossible);
        var bounds = NStepBounds.None;
        if (_bound is not null && double.IsFinite(correction))
        {
            var columns = Array.ConvertAll(_bound.OfColumns(steps), bound => bound + (2 * correction) + (states * double.Epsilon));
            bounds = NStepBounds.Of(columns, values, isPossible, ErrorBasis.SpectralResidual);
        }

        return bounds.ToCertificate(SpectralMethod.MethodName, reason, values, states, 0, _options);
    }

    private Eigenvector<TState>[] Vectors(Func<int, Complex[]> vector) =>
        [.. Enumerable.Range(0, Eigenvalues.Count).Select(index => new Eigenvector<TState>(States, Eigenvalues[index], vector(index)))];
}
