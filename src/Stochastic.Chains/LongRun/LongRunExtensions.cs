using Stochastic.Chains.LongRun;

namespace Stochastic.Chains;

/// <summary>Questions about what a chain comes to in the long run, from each start.</summary>
public static class LongRunExtensions
{
    /// <summary>Finds the share of time in each state in the long run, from every start.</summary>
    /// <typeparam name="TState">The type of a state.</typeparam>
    /// <param name="chain">Any chain: with several ends, with transient states, periodic.</param>
    /// <returns>The shares with their certificate.</returns>
    /// <exception cref="ConvergenceException">A recurrent class is too large for a direct solve and the iteration did not reach its tolerance.</exception>
    /// <exception cref="MemoryLimitException">There are several ends and too many transient states for a direct solve.</exception>
    /// <exception cref="NumericalRangeException">A share, or the probability of an end, is smaller than a double can hold.</exception>
    /// <remarks>
    /// The probability of ending in each recurrent class, times the stationary distribution inside it: with t transient states and c classes
    /// O(t² (t + c)), and the cost of <c>StationaryPerClass</c>. With one recurrent class all starts have the same shares, those of
    /// <c>Stationary</c>.
    /// </remarks>
    /// <example><code>double lost = pool.LongRun()["clean", "lost"];</code></example>
    public static LongRunMatrix<TState> LongRun<TState>(this Chain<TState> chain)
        where TState : notnull => LongRun(chain, new SolveOptions());

    /// <summary>Finds the share of time in each state in the long run, from every start, with options.</summary>
    /// <typeparam name="TState">The type of a state.</typeparam>
    /// <param name="chain">Any chain: with several ends, with transient states, periodic.</param>
    /// <param name="options">Evidence, cancellation, progress, threads and memory.</param>
    /// <exception cref="ConvergenceException">A recurrent class is too large for a direct solve and the iteration did not reach its tolerance.</exception>
    /// <exception cref="MemoryLimitException">There are several ends and too many transient states for a direct solve.</exception>
    /// <exception cref="NumericalRangeException">A share, or the probability of an end, is smaller than a double can hold.</exception>
    /// <exception cref="OperationCanceledException">The token of the options was cancelled.</exception>
    public static LongRunMatrix<TState> LongRun<TState>(this Chain<TState> chain, SolveOptions options)
        where TState : notnull
    {
        ArgumentNullException.ThrowIfNull(chain);
        ArgumentNullException.ThrowIfNull(options);
        return new LongRunMatrix<TState>(new LongRunParts<TState>(chain, options));
    }

    /// <summary>Finds the share of time in each state in the long run, from one start.</summary>
    /// <typeparam name="TState">The type of a state.</typeparam>
    /// <param name="start">A chain with its start.</param>
    /// <returns>The shares, and where there is a cycle its limits, with their certificate.</returns>
    /// <exception cref="ConvergenceException">A recurrent class is too large for a direct solve and the iteration did not reach its tolerance.</exception>
    /// <exception cref="MemoryLimitException">There are several ends and too many transient states for a direct solve.</exception>
    /// <exception cref="NumericalRangeException">A share, or the probability of an end, is smaller than a double can hold.</exception>
    /// <example><code>double scrapped = pool.StartingIn("dirty").LongRun()["scrapped"];</code></example>
    public static LongRunDistribution<TState> LongRun<TState>(this ChainStart<TState> start)
        where TState : notnull => LongRun(start, new SolveOptions());

    /// <summary>Finds the share of time in each state in the long run, from one start, with options.</summary>
    /// <typeparam name="TState">The type of a state.</typeparam>
    /// <param name="start">A chain with its start.</param>
    /// <param name="options">Evidence, cancellation, progress, threads and memory.</param>
    /// <exception cref="ConvergenceException">A recurrent class is too large for a direct solve and the iteration did not reach its tolerance.</exception>
    /// <exception cref="MemoryLimitException">There are several ends and too many transient states for a direct solve.</exception>
    /// <exception cref="NumericalRangeException">A share, or the probability of an end, is smaller than a double can hold.</exception>
    /// <exception cref="OperationCanceledException">The token of the options was cancelled.</exception>
    public static LongRunDistribution<TState> LongRun<TState>(this ChainStart<TState> start, SolveOptions options)
        where TState : notnull
    {
        ArgumentNullException.ThrowIfNull(start);
        ArgumentNullException.ThrowIfNull(options);
        return LongRunDistribution<TState>.Of(new LongRunParts<TState>(start.Chain, options), start.Distribution.ToArray());
    }
}
