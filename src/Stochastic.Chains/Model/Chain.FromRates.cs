namespace Stochastic.Chains;

public static partial class Chain
{
    /// <summary>Makes a chain from rates of moves in continuous time, by uniformization (Jensen 1953).</summary>
    /// <typeparam name="TState">The type of a state.</typeparam>
    /// <param name="rates">Moves per unit of time between different states, each pair at most once. A state without any is never left.</param>
    /// <returns>
    /// The uniformized chain. It keeps its <see cref="Chain{TState}.UniformizationRate"/> (a power of two, so no digit of a rate is
    /// lost): its long-run shares are those of the process in continuous time, and mean times come back in the unit of the rates.
    /// </returns>
    /// <exception cref="InvalidChainException">The rates have faults; all are listed.</exception>
    /// <example>
    /// <code>
    /// // per hour; invented figures
    /// var plant = Chain.FromRates([
    ///     new TransitionRate&lt;string&gt;("running", "failed", 1e-4),
    ///     new TransitionRate&lt;string&gt;("failed", "running", 0.05)]);
    /// </code>
    /// </example>
    public static Chain<TState> FromRates<TState>(IEnumerable<TransitionRate<TState>> rates)
        where TState : notnull => FromRates(rates, new ChainOptions<TState>());

    /// <summary>Makes a chain from rates of moves in continuous time, with options.</summary>
    /// <typeparam name="TState">The type of a state.</typeparam>
    /// <param name="rates">Moves per unit of time between different states, each pair at most once.</param>
    /// <param name="options">How labels are compared; row sums play no part.</param>
    /// <exception cref="InvalidChainException">The rates have faults; all are listed.</exception>
    public static Chain<TState> FromRates<TState>(IEnumerable<TransitionRate<TState>> rates, ChainOptions<TState> options)
        where TState : notnull
    {
        ArgumentNullException.ThrowIfNull(rates);
        ArgumentNullException.ThrowIfNull(options);
        var assembler = new ChainAssembler<TState>(options);
        foreach (var (from, to, rate) in rates)
        {
            assembler.Add(from, to, rate);
        }

        return assembler.AssembleRates() ?? throw assembler.Faults.ToException();
    }
}
