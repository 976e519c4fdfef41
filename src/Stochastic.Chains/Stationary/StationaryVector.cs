namespace Stochastic.Chains;

/// <summary>The raw vector that a stationary method returns, before the library checks and certifies it.</summary>
/// <param name="Values">One number for each state of the problem, proportional to its long-run share; need not sum to one.</param>
/// <example><code>return new StationaryVector(values) { HasConverged = true, Reason = "Direct.", Iterations = 0 };</code></example>
public sealed record StationaryVector(ReadOnlyMemory<double> Values)
{
    /// <summary>Gets whether the vector is as good as the method's options ask for. Always true for a direct method.</summary>
    public required bool HasConverged { get; init; }

    /// <summary>Gets a sentence on how the method went about it, for the certificate.</summary>
    public required string Reason { get; init; }

    /// <summary>Gets the number of iterations made; 0 for a direct method.</summary>
    public long Iterations { get; init; }

    /// <summary>Gets what to try when the vector has not converged.</summary>
    public string Advice { get; init; } = "Allow more iterations, or ask EliminationMethod.";

    /// <summary>A proved bound on the relative error of every ratio of two entries, where the method has one of its own.</summary>
    internal double AprioriBound { get; init; } = double.PositiveInfinity;
}
