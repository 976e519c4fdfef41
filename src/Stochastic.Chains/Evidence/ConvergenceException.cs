namespace Stochastic.Chains;

/// <summary>An iteration ended without an answer of the accuracy that was asked for. Carries what was reached and what to try.</summary>
/// <example>
/// <code>
/// try { _ = chain.Stationary(new PowerMethod { MaxIterations = 100 }); }
/// catch (ConvergenceException early) { Console.WriteLine($"{early.Certificate}; {early.Advice}"); }
/// </code>
/// </example>
public sealed class ConvergenceException : InvalidOperationException
{
    internal ConvergenceException(string message, double[] iterate, Certificate certificate, string advice)
        : base(message)
    {
        Iterate = iterate;
        Certificate = certificate;
        Advice = advice;
    }

    /// <summary>Gets the best vector that was reached, in state order.</summary>
    public ReadOnlyMemory<double> Iterate { get; }

    /// <summary>Gets the evidence for the best vector: its residual and, where one can be given, its error bound.</summary>
    public Certificate Certificate { get; }

    /// <summary>Gets the number of iterations made.</summary>
    public long Iterations => Certificate.Iterations;

    /// <summary>Gets what to try instead.</summary>
    public string Advice { get; }
}
