namespace Stochastic.Chains;

/// <summary>A result was required to be proved to an accuracy that its certificate does not prove.</summary>
/// <example>
/// <code>
/// try { _ = chain.Stationary(new PowerMethod()).Require(relativeError: 1e-12); }
/// catch (AccuracyException unproved) { Console.WriteLine(unproved.Certificate); }
/// </code>
/// </example>
public sealed class AccuracyException : InvalidOperationException
{
    internal AccuracyException(string message, Certificate certificate)
        : base(message) => Certificate = certificate;

    /// <summary>Gets the certificate that fell short.</summary>
    public Certificate Certificate { get; }
}
