using Stochastic.Chains.Steps;

namespace Stochastic.Chains;

/// <summary>Propagation: each row by itself, one multiplication with the chain for each step.</summary>
/// <remarks>
/// The cheapest way for a few steps of a chain with few moves. Only products and sums of non-negative numbers; the entrywise bound grows
/// with n. O(n · states · transitions) time; 8 states² bytes for the result.
/// </remarks>
/// <example><code>NStepMatrix&lt;string&gt; week = chain.NStep(7, new PropagationMethod());</code></example>
public sealed record PropagationMethod : NStepMethod
{
    /// <inheritdoc/>
    public override string Name => "propagation";

    internal override NStepMatrix<TState> Solve<TState>(Chain<TState> chain, long steps, string reason, SolveOptions options)
    {
        var size = chain.StateCount;
        options.RequireMemory(size, sizeof(double) * (long)size * size);
        var rows = new PropagatedRows(StepMatrix.Of(chain), size, steps, options);
        var values = rows.Run(options.Report("propagation"));
        var bounds = options.CertificateLevel == CertificateLevel.Proof ? rows.Bounds(values) : NStepBounds.None;
        return new NStepMatrix<TState>(chain.States, values, steps, bounds.ToCertificate(Name, reason, values, size, steps, options));
    }
}
