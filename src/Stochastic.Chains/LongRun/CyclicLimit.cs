namespace Stochastic.Chains;

/// <summary>What the distributions of a periodic chain settle to when only one step of each period is looked at.</summary>
/// <typeparam name="TState">The type of a state.</typeparam>
/// <remarks>The residual of its certificate is the largest of those of its parts. Immutable and safe for concurrent use.</remarks>
/// <example>
/// <code>
/// LongRunDistribution&lt;string&gt; shifts = plan.StartingIn("early").LongRun();
/// CyclicLimit&lt;string&gt; onEvenWeeks = shifts.AtPhase(0);
/// </code>
/// </example>
public sealed class CyclicLimit<TState> : Distribution<TState>, ICertified
    where TState : notnull
{
    internal CyclicLimit(StateSpace<TState> states, double[] values, long phase, Certificate certificate)
        : base(states, values)
    {
        Phase = phase;
        Certificate = certificate;
    }

    /// <summary>Gets the first of the steps that are looked at; the others follow at the period.</summary>
    public long Phase { get; }

    /// <inheritdoc/>
    public Certificate Certificate { get; }
}
