using Stochastic.Chains.Internal;
using Stochastic.Chains.Kernels;
using Stochastic.Chains.Steps;

namespace Stochastic.Chains;

/// <summary>Questions about the eigenvalues of a chain.</summary>
public static class SpectralExtensions
{
    private const int Tables = 13;

    /// <summary>Finds the eigenvalues and eigenvectors of the transition matrix.</summary>
    /// <typeparam name="TState">The type of a state.</typeparam>
    /// <param name="chain">The chain.</param>
    /// <returns>The decomposition with its certificate.</returns>
    /// <exception cref="MemoryLimitException">The chain has too many states for full matrices.</exception>
    /// <exception cref="ConvergenceException">The iteration did not separate all eigenvalues within its cap.</exception>
    /// <remarks>
    /// A reversible chain without transient states takes the symmetric form, any other (and one whose shares differ by more than 10¹²) the real Schur form. Self-loops are one minus the sum of the
    /// other moves of a row, as for all steps. O(states³) time and about 100 states² bytes.
    /// </remarks>
    /// <example><code>double relaxation = chain.Spectrum().RelaxationTime;</code></example>
    public static SpectralDecomposition<TState> Spectrum<TState>(this Chain<TState> chain)
        where TState : notnull => Spectrum(chain, new SolveOptions());

    /// <summary>Finds the eigenvalues and eigenvectors of the transition matrix, with options.</summary>
    /// <typeparam name="TState">The type of a state.</typeparam>
    /// <param name="chain">The chain.</param>
    /// <param name="options">Evidence (of powers too), memory, threads and cancellation.</param>
    /// <exception cref="MemoryLimitException">The chain needs more memory than allowed.</exception>
    /// <exception cref="ConvergenceException">The iteration did not separate all eigenvalues within its cap.</exception>
    /// <exception cref="OperationCanceledException">The token of the options was cancelled.</exception>
    public static SpectralDecomposition<TState> Spectrum<TState>(this Chain<TState> chain, SolveOptions options)
        where TState : notnull
    {
        ArgumentNullException.ThrowIfNull(chain);
        ArgumentNullException.ThrowIfNull(options);
        var order = chain.StateCount;
        options.RequireMemory(order, Tables * sizeof(double) * (long)order * order);
        var step = new double[order * order];
        var matrix = StepMatrix.Of(chain);
        matrix.CopyTo(new MatrixView(step, 0, order));
        var outcome = SpectralSolve.Run(chain, step, options.CancellationToken);
        var method = outcome.IsSymmetric ? "symmetric QL iteration" : "QR iteration";
        var certificate = new Certificate
        {
            Method = method,
            Reason = outcome.IsSymmetric
                ? "Reversible and without transient states: the symmetric form has orthogonal vectors."
                : "Not reversible, with transient states, or with shares too far apart: the real Schur form of the matrix.",
            Iterations = outcome.Sweeps,
        };
        if (outcome.Factors is not { } factors)
        {
            throw new ConvergenceException(
                Messages.NotConverged(method, outcome.Sweeps, certificate.Residual, Messages.AskSquaring), [], certificate, Messages.AskSquaring);
        }

        var sharing = new WorkSharing(options.Parallelism, options.CancellationToken);
        var residuals = options.CertificateLevel >= CertificateLevel.Residual ? SpectralBound.Residuals(factors, step, sharing) : null;
        var hasOnes = factors.Eigenvalues[0] == 1 && factors.RightVector(0).All(entry => entry == 1);
        var bound = options.CertificateLevel == CertificateLevel.Proof
            ? SpectralBound.Of(factors, residuals!, matrix.StayRoundings + 4, hasOnes, sharing)
            : null;
        var ofEigenvalues = bound?.OfEigenvalues() ?? double.PositiveInfinity;
        var isProof = double.IsFinite(ofEigenvalues);
        certificate = certificate with
        {
            Residual = residuals?.Max() is { } residual && double.IsFinite(residual) ? residual : double.PositiveInfinity,
            AbsoluteErrorBound = isProof ? ofEigenvalues : double.PositiveInfinity,
            Basis = isProof ? ErrorBasis.SpectralResidual : ErrorBasis.None,
            IsProof = isProof,
        };
        return new SpectralDecomposition<TState>(chain, step, factors, outcome.IsSymmetric, bound, certificate, options);
    }
}
