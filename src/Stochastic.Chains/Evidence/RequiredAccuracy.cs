using System.Runtime.CompilerServices;
using Stochastic.Chains.Internal;

namespace Stochastic.Chains;

/// <summary>Compares what a caller requires with what a certificate proves.</summary>
internal static class RequiredAccuracy
{
    /// <summary>Throws unless the bound is proved and within what is required.</summary>
    /// <exception cref="ArgumentOutOfRangeException">What is required is not above 0.</exception>
    /// <exception cref="AccuracyException">The certificate is no proof, or its bound is larger.</exception>
    internal static void Check(
        Certificate certificate, string kind, double bound, double required, [CallerArgumentExpression(nameof(required))] string? parameter = null)
    {
        if (!(required > 0))
        {
            throw new ArgumentOutOfRangeException(parameter, required, Messages.RequiredErrorOutOfRange);
        }

        if (!certificate.IsProof || bound > required)
        {
            throw new AccuracyException(Messages.NotProved(kind, required, bound, certificate.IsProof && double.IsFinite(bound), certificate.ToString()), certificate);
        }
    }
}
