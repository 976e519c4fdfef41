namespace Stochastic.Chains.Stationary;

/// <summary>Writes the certificate of a stationary vector: the residual of what is returned, and the best bound that can be proved.</summary>
internal static class StationaryCertificate
{
    internal static Certificate OfSingleState { get; } = new()
    {
        Method = "structure",
        Reason = "The only recurrent state holds everything in the long run.",
        Residual = 0,
        RelativeErrorBound = 0,
        AbsoluteErrorBound = 0,
        Basis = ErrorBasis.Structure,
        IsProof = true,
    };

    internal static Certificate Of(StationaryProblem problem, IStationaryMethod method, StationaryVector vector, string choice, double[] shares)
    {
        var level = problem.Options.CertificateLevel;
        var (basis, relative) = level == CertificateLevel.Proof ? BestBound(vector) : (ErrorBasis.None, double.PositiveInfinity);
        return new Certificate
        {
            Method = method.Name,
            Reason = $"{choice} {vector.Reason}",
            Residual = level >= CertificateLevel.Residual ? FlowResidual.Of(problem, shares) : double.PositiveInfinity,
            RelativeErrorBound = relative,
            AbsoluteErrorBound = relative * shares.Max(),
            Basis = basis,
            IsProof = basis != ErrorBasis.None,
            Iterations = vector.Iterations,
        };
    }

    private static (ErrorBasis Basis, double Relative) BestBound(StationaryVector vector) => double.IsFinite(vector.AprioriBound)
        ? (ErrorBasis.SubtractionFree, vector.AprioriBound)
        : (ErrorBasis.None, double.PositiveInfinity);
}
