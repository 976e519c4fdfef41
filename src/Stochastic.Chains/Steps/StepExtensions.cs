using Stochastic.Chains.Internal;

namespace Stochastic.Chains;

/// <summary>Questions about where things stand after some steps.</summary>
public static class StepExtensions
{
    /// <summary>Starts the chain in one state.</summary>
    /// <typeparam name="TState">The type of a state.</typeparam>
    /// <param name="chain">The chain.</param>
    /// <param name="state">The state to start in.</param>
    /// <exception cref="UnknownStateException">The label is none of the chain's states.</exception>
    /// <example><code>var inFourWeeks = chain.StartingIn("dirty").After(4);</code></example>
    public static ChainStart<TState> StartingIn<TState>(this Chain<TState> chain, TState state)
        where TState : notnull
    {
        ArgumentNullException.ThrowIfNull(chain);
        return new ChainStart<TState>(chain, Distribution.Certain(chain.States, state));
    }

    /// <summary>Starts the chain in several states at once, each with its share.</summary>
    /// <typeparam name="TState">The type of a state.</typeparam>
    /// <param name="chain">The chain.</param>
    /// <param name="distribution">Where to start: a distribution over the states of this chain.</param>
    /// <exception cref="ArgumentException">The distribution is over other states.</exception>
    /// <example><code>var start = chain.StartingIn(Distribution.FromWeights(chain.States, ("clean", 1200), ("dirty", 310)));</code></example>
    public static ChainStart<TState> StartingIn<TState>(this Chain<TState> chain, Distribution<TState> distribution)
        where TState : notnull
    {
        ArgumentNullException.ThrowIfNull(chain);
        ArgumentNullException.ThrowIfNull(distribution);
        return chain.States.Matches(distribution.States)
            ? new ChainStart<TState>(chain, distribution)
            : throw new ArgumentException(Messages.DifferentStates(chain.StateCount, distribution.Count), nameof(distribution));
    }

    /// <summary>Starts a number of items, each of which moves through the chain independently of the others.</summary>
    /// <typeparam name="TState">The type of a state.</typeparam>
    /// <param name="chain">The chain.</param>
    /// <param name="counts">States with how many items start there, each state at most once; states not named get none.</param>
    /// <exception cref="ArgumentException">A number is negative or too large, or a state is repeated.</exception>
    /// <exception cref="UnknownStateException">A label is none of the chain's states.</exception>
    /// <example><code>var quarter = pool.StartingWith(("clean", 1200), ("dirty", 310)).Forecast(13);</code></example>
    public static Population<TState> StartingWith<TState>(this Chain<TState> chain, params IEnumerable<(TState State, long Count)> counts)
        where TState : notnull
    {
        ArgumentNullException.ThrowIfNull(chain);
        return Population<TState>.Of(chain, counts, nameof(counts));
    }
}
