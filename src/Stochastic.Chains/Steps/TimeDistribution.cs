namespace Stochastic.Chains;

/// <summary>Where things stand after a time, in the unit of the rates of the chain.</summary>
/// <typeparam name="TState">The type of a state.</typeparam>
/// <remarks>
/// The residual of its certificate is |sum of the probabilities − 1|; its iterations are the steps of the uniformized chain that were made. What
/// was left out of the series is part of both bounds. Immutable and safe for concurrent use.
/// </remarks>
/// <example><code>double up = plant.StartingIn("both run").AfterTime(24)["both run"];   // after 24 hours, when rates are per hour</code></example>
public sealed class TimeDistribution<TState> : Distribution<TState>, ICertified
    where TState : notnull
{
    internal TimeDistribution(StateSpace<TState> states, double[] values, double time, Certificate certificate)
        : base(states, values)
    {
        Time = time;
        Certificate = certificate;
    }

    /// <summary>Gets the time from the start, in the unit of the rates.</summary>
    public double Time { get; }

    /// <inheritdoc/>
    public Certificate Certificate { get; }
}
