using Stochastic.Chains.Internal;
using Stochastic.Chains.Passage;

namespace Stochastic.Chains;

/// <summary>Questions about how long it takes until something first happens, and where things end.</summary>
public static class PassageExtensions
{
    /// <summary>Finds the mean time, from every state, until a target state is first reached.</summary>
    /// <typeparam name="TState">The type of a state.</typeparam>
    /// <param name="chain">Any chain.</param>
    /// <param name="target">The state to reach.</param>
    /// <returns>Mean times and reaching probabilities with their certificate.</returns>
    /// <exception cref="UnknownStateException">The target is none of the chain's states.</exception>
    /// <exception cref="MemoryLimitException">Too many states lie before the target for a direct solve.</exception>
    /// <exception cref="NumericalRangeException">A mean time is larger than a double can hold.</exception>
    /// <remarks>
    /// State reduction with an explicit exit rate for each state (Alfa, Xue and Ye 2002): nothing is subtracted, so rare targets
    /// come out with as many correct digits as common ones. O(n³) time for n states before the target.
    /// </remarks>
    /// <example><code>double weeks = pump.TimeTo("failed").Mean("new");</code></example>
    public static HittingTimes<TState> TimeTo<TState>(this Chain<TState> chain, TState target)
        where TState : notnull => TimeToAny(chain, [target], new SolveOptions());

    /// <summary>Finds the mean time, from every state, until a target state is first reached, with options.</summary>
    /// <typeparam name="TState">The type of a state.</typeparam>
    /// <param name="chain">Any chain.</param>
    /// <param name="target">The state to reach.</param>
    /// <param name="options">Evidence, cancellation, progress and memory.</param>
    /// <exception cref="UnknownStateException">The target is none of the chain's states.</exception>
    /// <exception cref="MemoryLimitException">Too many states lie before the target for a direct solve.</exception>
    /// <exception cref="NumericalRangeException">A mean time is larger than a double can hold.</exception>
    /// <exception cref="OperationCanceledException">The token of the options was cancelled.</exception>
    public static HittingTimes<TState> TimeTo<TState>(this Chain<TState> chain, TState target, SolveOptions options)
        where TState : notnull => TimeToAny(chain, [target], options);

    /// <summary>Finds the mean time, from every state, until any of several target states is first reached.</summary>
    /// <typeparam name="TState">The type of a state.</typeparam>
    /// <param name="chain">Any chain.</param>
    /// <param name="targets">The states of which one is to be reached; at least one.</param>
    /// <returns>Mean times and reaching probabilities with their certificate.</returns>
    /// <exception cref="ArgumentException">No targets are given.</exception>
    /// <exception cref="UnknownStateException">A target is none of the chain's states.</exception>
    /// <exception cref="MemoryLimitException">Too many states lie before the targets for a direct solve.</exception>
    /// <exception cref="NumericalRangeException">A mean time is larger than a double can hold.</exception>
    /// <example><code>double weeks = pool.TimeToAny(["lost", "scrapped"]).Mean("clean");</code></example>
    public static HittingTimes<TState> TimeToAny<TState>(this Chain<TState> chain, IEnumerable<TState> targets)
        where TState : notnull => TimeToAny(chain, targets, new SolveOptions());

    /// <summary>Finds the mean time, from every state, until any of several target states is first reached, with options.</summary>
    /// <typeparam name="TState">The type of a state.</typeparam>
    /// <param name="chain">Any chain.</param>
    /// <param name="targets">The states of which one is to be reached; at least one.</param>
    /// <param name="options">Evidence, cancellation, progress and memory.</param>
    /// <exception cref="ArgumentException">No targets are given.</exception>
    /// <exception cref="UnknownStateException">A target is none of the chain's states.</exception>
    /// <exception cref="MemoryLimitException">Too many states lie before the targets for a direct solve.</exception>
    /// <exception cref="NumericalRangeException">A mean time is larger than a double can hold.</exception>
    /// <exception cref="OperationCanceledException">The token of the options was cancelled.</exception>
    public static HittingTimes<TState> TimeToAny<TState>(this Chain<TState> chain, IEnumerable<TState> targets, SolveOptions options)
        where TState : notnull
    {
        ArgumentNullException.ThrowIfNull(chain);
        ArgumentNullException.ThrowIfNull(targets);
        ArgumentNullException.ThrowIfNull(options);
        int[] positions = [.. targets.Select(chain.States.Require).Distinct()];
        return positions.Length > 0
            ? HittingSolve<TState>.Of(chain, positions, options)
            : throw new ArgumentException(Messages.NoTargets, nameof(targets));
    }

    /// <summary>Finds where things end: for each transient state, which recurrent class is entered and how long that takes.</summary>
    /// <typeparam name="TState">The type of a state.</typeparam>
    /// <param name="chain">Any chain; without transient states every answer follows from the structure.</param>
    /// <returns>Probabilities and mean steps with their certificate.</returns>
    /// <exception cref="MemoryLimitException">There are too many transient states for a direct solve.</exception>
    /// <exception cref="NumericalRangeException">A mean time is larger than a double can hold.</exception>
    /// <remarks>State reduction with explicit exit rates (Alfa, Xue and Ye 2002). O(t² (t + c)) time for t transient states and c recurrent classes.</remarks>
    /// <example><code>double lost = pool.Absorption().Probability("clean", "lost");</code></example>
    public static Absorption<TState> Absorption<TState>(this Chain<TState> chain)
        where TState : notnull => Absorption(chain, new SolveOptions());

    /// <summary>Finds where things end, with options.</summary>
    /// <typeparam name="TState">The type of a state.</typeparam>
    /// <param name="chain">Any chain.</param>
    /// <param name="options">Evidence, cancellation, progress and memory.</param>
    /// <exception cref="MemoryLimitException">There are too many transient states for a direct solve.</exception>
    /// <exception cref="NumericalRangeException">A mean time is larger than a double can hold.</exception>
    /// <exception cref="OperationCanceledException">The token of the options was cancelled.</exception>
    public static Absorption<TState> Absorption<TState>(this Chain<TState> chain, SolveOptions options)
        where TState : notnull
    {
        ArgumentNullException.ThrowIfNull(chain);
        ArgumentNullException.ThrowIfNull(options);
        return AbsorptionSolve<TState>.Of(chain, options);
    }
}
