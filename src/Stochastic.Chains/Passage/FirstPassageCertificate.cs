using Stochastic.Chains.Kernels;

namespace Stochastic.Chains.Passage;

/// <summary>What is said about a table of mean first passage times.</summary>
internal static class FirstPassageCertificate
{
    /// <summary>Nothing was computed.</summary>
    internal static Certificate OfStructure { get; } = new()
    {
        Method = "structure",
        Reason = "Every figure is one step or infinite by the possible moves alone.",
        Residual = 0,
        RelativeErrorBound = 0,
        AbsoluteErrorBound = 0,
        Basis = ErrorBasis.Structure,
        IsProof = true,
    };

    internal static Certificate Of(CertificateLevel level, double error, double residual, ReadOnlySpan<double> values, bool isWide)
    {
        var isProof = level == CertificateLevel.Proof && double.IsFinite(error);
        return new Certificate
        {
            Method = "recursive state reduction",
            Reason = isWide
                ? "Direct and free of subtraction; repeated with wider exponents because some products lie outside the range of a double."
                : "Direct and free of subtraction: rare and long passages keep their digits.",
            Residual = level >= CertificateLevel.Residual ? residual : double.PositiveInfinity,
            RelativeErrorBound = isProof ? error : double.PositiveInfinity,
            AbsoluteErrorBound = isProof ? AbsoluteBound.From(error, LargestFinite(values)) : double.PositiveInfinity,
            Basis = isProof ? ErrorBasis.SubtractionFree : ErrorBasis.None,
            IsProof = isProof,
        };
    }

    private static double LargestFinite(ReadOnlySpan<double> values)
    {
        var largest = 0.0;
        foreach (var value in values)
        {
            largest = double.IsFinite(value) ? Math.Max(largest, value) : largest;
        }

        return largest;
    }
}
