namespace Stochastic.Chains;

/// <summary>The stationary distribution of a chain: the long-run share of time in each state.</summary>
/// <typeparam name="TState">The type of a state.</typeparam>
/// <remarks>
/// One step leaves it as it is: inflow and outflow of every state are equal. The residual of its certificate is the largest
/// |inflow − outflow| / outflow over the states. Immutable and safe for concurrent use.
/// </remarks>
/// <example>
/// <code>
/// StationaryDistribution&lt;string&gt; shares = chain.Stationary();
/// double inRepair = shares["in repair"];
/// bool proved = shares.Certificate.IsProof;
/// </code>
/// </example>
public sealed class StationaryDistribution<TState> : Distribution<TState>, ICertified
    where TState : notnull
{
    internal StationaryDistribution(StateSpace<TState> states, double[] values, Certificate certificate)
        : base(states, values) => Certificate = certificate;

    /// <inheritdoc/>
    public Certificate Certificate { get; }
}
