namespace Stochastic.Chains.Passage;

/// <summary>Gathers the evidence of the systems behind one answer into its certificate.</summary>
internal sealed class SolveEvidence(SolveOptions options)
{
    private double _residual;
    private double _bound;
    private bool _hasSolved;

    internal void Add(double relativeErrorBound, Func<double> residual)
    {
        _hasSolved = true;
        _bound = Math.Max(_bound, relativeErrorBound);
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
            Basis = isProof ? ErrorBasis.SubtractionFree : ErrorBasis.None,
            IsProof = isProof,
        };
    }
}
