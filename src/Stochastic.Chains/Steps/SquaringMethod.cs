using Stochastic.Chains.Kernels;
using Stochastic.Chains.Steps;

namespace Stochastic.Chains;

/// <summary>Repeated squaring: powers are squared and multiplied along a short addition chain for n.</summary>
/// <remarks>
/// Only products and sums of non-negative numbers, so small probabilities are as exact as large ones; rows are divided by their sums
/// after each product. The entrywise bound grows with n; once the chain forgets its start, a bound on contraction takes over and hardly
/// grows any more. Never more multiplications than the binary digits of n ask for, often fewer; O(states³ log n) time, and 32 states² bytes
/// or a little more.
/// </remarks>
/// <example><code>NStepMatrix&lt;string&gt; year = chain.NStep(52, new SquaringMethod());</code></example>
public sealed record SquaringMethod : NStepMethod
{
    /// <inheritdoc/>
    public override string Name => "repeated squaring";

    /// <summary>The vectors to compute with; tests force each kind.</summary>
    internal InstructionSet Instructions { get; init; } = InstructionSet.Widest;

    internal override NStepMatrix<TState> Solve<TState>(Chain<TState> chain, long steps, string reason, SolveOptions options)
    {
        var groups = options.CertificateLevel == CertificateLevel.Proof ? CyclicGroups.Of(chain) : null;
        using var power = new StepPower(StepMatrix.Of(chain), chain.StateCount, steps, groups, Instructions, options);
        var values = power.Raise(options.Report("squaring"));
        var bounds = power.Errors is { } errors ? NStepBounds.Of(errors, values) : NStepBounds.None;
        return new NStepMatrix<TState>(chain.States, values, steps, bounds.ToCertificate(Name, reason, values, chain.StateCount, power.Products, options));
    }
}
