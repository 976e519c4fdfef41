namespace Stochastic.Chains;

/// <summary>Where things stand after a long time, given that they have not ended yet, and how fast they end.</summary>
/// <typeparam name="TState">The type of a state.</typeparam>
/// <remarks>
/// The shares x of the transient states satisfy x · P = λ · x over them: from step to step they stay the same, while all that is still in
/// shrinks by λ (Darroch and Seneta 1965). Recurrent states, and transient ones that are left too fast to matter, have share 0. When the slowest class of transient states is
/// periodic the shares are still the solution, though those of a given start keep turning around it. The residual of the certificate is the largest
/// relative difference between the two sides of (1 − λ) · x · A⁻¹ = x, re-computed. Immutable and safe for concurrent use.
/// </remarks>
/// <example>
/// <code>
/// QuasiStationaryDistribution&lt;string&gt; inUse = pool.QuasiStationary();
/// double dirty = inUse["dirty"];
/// double weeksLeft = inUse.MeanTimeToLeave;
/// </code>
/// </example>
public sealed class QuasiStationaryDistribution<TState> : Distribution<TState>, ICertified
    where TState : notnull
{
    internal QuasiStationaryDistribution(StateSpace<TState> states, double[] values, double decayRate, double decayRateErrorBound, Certificate certificate)
        : base(states, values)
    {
        DecayRate = decayRate;
        DecayRateErrorBound = decayRateErrorBound;
        Certificate = certificate;
    }

    /// <inheritdoc/>
    public Certificate Certificate { get; }

    /// <summary>
    /// Gets the decay rate 1 − λ: the share of what is still in that ends with each step, or per unit of time for a chain made from rates. Keeps its
    /// digits when it is tiny.
    /// </summary>
    public double DecayRate { get; }

    /// <summary>Gets a proved bound on the relative error of <see cref="DecayRate"/>, from the theorem of Collatz and Wielandt; +∞ when none was asked for.</summary>
    public double DecayRateErrorBound { get; }

    /// <summary>Gets the mean time until those that stand like this end: 1 / <see cref="DecayRate"/>.</summary>
    public double MeanTimeToLeave => 1 / DecayRate;
}
