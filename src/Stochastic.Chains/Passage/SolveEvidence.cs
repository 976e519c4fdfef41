using Stochastic.Chains.Kernels;

namespace Stochastic.Chains.Passage;

/// <summary>Gathers the evidence of the systems behind one answer into its certificate.</summary>
internal sealed class SolveEvidence(SolveOptions options)
{
    private double _residual;
    private double _bound;
    private double _absoluteBound;
    private ErrorBasis _basis = ErrorBasis.SubtractionFree;
    private bool _hasSolved;

    /// <summary>Takes in one solution; the weakest of all is what the certificate states.</summary>
    internal void Add(ExitSolution solution, Func<double> residual)
    {
        if (!_hasSolved || solution.RelativeErrorBound > _bound)
        {
            (_bound, _basis) = (solution.RelativeErrorBound, solution.Basis);
        }

        _absoluteBound = Math.Max(_absoluteBound, AbsoluteBound.From(solution.RelativeErrorBound, solution.Values.Max()));
        _hasSolved = true;
        if (options.CertificateLevel >= CertificateLevel.Residual)
        {
            _residual = Math.Max(_residual, residual());
        }
    }

    internal Certificate ToCertificate()
    {
        if (!_hasSolved)
        {
            return new Certificate
            {
                Method = "structure",
                Reason = "Every figure is certain, impossible or infinite by the possible moves alone.",
                Residual = 0,
                RelativeErrorBound = 0,
                AbsoluteErrorBound = 0,
                Basis = ErrorBasis.Structure,
                IsProof = true,
            };
        }

        var isProof = options.CertificateLevel == CertificateLevel.Proof && double.IsFinite(_bound);
        return new Certificate
        {
            Method = "state reduction with exit rates",
            Reason = "Direct and free of subtraction: rare ends and long times keep their digits.",
            Residual = options.CertificateLevel >= CertificateLevel.Residual ? _residual : double.PositiveInfinity,
            RelativeErrorBound = isProof ? _bound : double.PositiveInfinity,
            AbsoluteErrorBound = isProof ? _absoluteBound : double.PositiveInfinity,
            Basis = isProof ? _basis : ErrorBasis.None,
            IsProof = isProof,
        };
    }
}
