namespace Stochastic.Chains;

/// <summary>Diagonalization: the power of each eigenvalue between the right and the left eigenvectors.</summary>
/// <remarks>
/// Here for comparison and for many powers of one small chain, where <c>Spectrum()</c> is asked once and its <c>NStep</c> often. Its error is absolute, so small
/// probabilities lose digits, and it grows with the condition number of the eigenvectors; the certificate proves how far, or says that
/// nothing is proved, as for a chain without a full set of eigenvectors. Entries that rounding left outside 0 to 1 are taken back, which brings
/// them no farther from the truth, and rows are divided by their sums; the bound includes both. O(states³) time and about 100 states² bytes.
/// </remarks>
/// <example><code>NStepMatrix&lt;string&gt; year = chain.NStep(52, new SpectralMethod());</code></example>
public sealed record SpectralMethod : NStepMethod
{
    internal const string MethodName = "diagonalization";

    /// <inheritdoc/>
    public override string Name => MethodName;

    internal override NStepMatrix<TState> Solve<TState>(Chain<TState> chain, long steps, string reason, SolveOptions options) =>
        chain.Spectrum(options).Power(steps, reason);
}
