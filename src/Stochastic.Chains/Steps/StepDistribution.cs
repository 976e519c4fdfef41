namespace Stochastic.Chains;

/// <summary>Where things stand after a number of steps.</summary>
/// <typeparam name="TState">The type of a state.</typeparam>
/// <remarks>
/// The residual of its certificate is |sum of the probabilities − 1|, which exact steps would leave as it was at the start.
/// Immutable and safe for concurrent use.
/// </remarks>
/// <example><code>StepDistribution&lt;string&gt; inFourWeeks = chain.StartingIn("dirty").After(4);</code></example>
public sealed class StepDistribution<TState> : Distribution<TState>, ICertified
    where TState : notnull
{
    internal StepDistribution(StateSpace<TState> states, double[] values, long steps, Certificate certificate)
        : base(states, values)
    {
        Steps = steps;
        Certificate = certificate;
    }

    /// <summary>Gets the number of steps from the start.</summary>
    public long Steps { get; }

    /// <inheritdoc/>
    public Certificate Certificate { get; }
}
