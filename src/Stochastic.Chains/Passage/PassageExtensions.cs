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

    /// <summary>Finds how likely it is that a state is first reached with exactly, or within, each number of steps, without solving for mean times.</summary>
    /// <typeparam name="TState">The type of a state.</typeparam>
    /// <param name="chain">A chain of any size that was given per step.</param>
    /// <param name="from">The state to start in.</param>
    /// <param name="target">The state to reach.</param>
    /// <param name="maxSteps">The horizon, 0 or more steps.</param>
    /// <exception cref="UnknownStateException">A label is none of the chain's states.</exception>
    /// <exception cref="ArgumentOutOfRangeException">The horizon is negative.</exception>
    /// <exception cref="InvalidOperationException">The chain was made from rates, so its time is not counted in steps.</exception>
    /// <exception cref="MemoryLimitException">The horizon takes more memory than allowed.</exception>
    /// <remarks>What <c>TimeTo(target).Distribution(from, maxSteps)</c> gives, for chains that are too large for a direct solve: O(transitions) a step.</remarks>
    /// <example><code>double withinAYear = network.FirstPassageDistribution("start", "goal", 365).CumulativeProbability(365);</code></example>
    public static PassageTimeDistribution<TState> FirstPassageDistribution<TState>(this Chain<TState> chain, TState from, TState target, int maxSteps)
        where TState : notnull => FirstPassageDistribution(chain, from, target, maxSteps, new SolveOptions());

    /// <summary>Finds how likely it is that a state is first reached with exactly, or within, each number of steps, with options.</summary>
    /// <typeparam name="TState">The type of a state.</typeparam>
    /// <param name="chain">A chain of any size that was given per step.</param>
    /// <param name="from">The state to start in.</param>
    /// <param name="target">The state to reach.</param>
    /// <param name="maxSteps">The horizon, 0 or more steps.</param>
    /// <param name="options">Evidence, cancellation, progress and memory.</param>
    /// <exception cref="UnknownStateException">A label is none of the chain's states.</exception>
    /// <exception cref="ArgumentOutOfRangeException">The horizon is negative.</exception>
    /// <exception cref="InvalidOperationException">The chain was made from rates, so its time is not counted in steps.</exception>
    /// <exception cref="MemoryLimitException">The horizon takes more memory than allowed.</exception>
    /// <exception cref="OperationCanceledException">The token of the options was cancelled.</exception>
    public static PassageTimeDistribution<TState> FirstPassageDistribution<TState>(
        this Chain<TState> chain, TState from, TState target, int maxSteps, SolveOptions options)
        where TState : notnull
    {
        ArgumentNullException.ThrowIfNull(chain);
        ArgumentNullException.ThrowIfNull(options);
        int[] targets = [chain.States.Require(target)];
        return maxSteps >= 0
            ? new HittingQuestion<TState>(chain, targets, TargetSplit.Of(chain, targets), options).Distribution(from, maxSteps, options)
            : throw new ArgumentOutOfRangeException(nameof(maxSteps), maxSteps, Messages.NegativeSteps(maxSteps));
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

    /// <summary>Finds, from every state, how likely one state is reached before another.</summary>
    /// <typeparam name="TState">The type of a state.</typeparam>
    /// <param name="chain">Any chain.</param>
    /// <param name="first">The state that is to come first.</param>
    /// <param name="second">The state that must not come before it.</param>
    /// <returns>Probabilities of the first, of the second and of neither, with their certificate.</returns>
    /// <exception cref="ArgumentException">Both are the same state.</exception>
    /// <exception cref="UnknownStateException">A label is none of the chain's states.</exception>
    /// <exception cref="MemoryLimitException">Too many states lie before the two for a direct solve.</exception>
    /// <exception cref="NumericalRangeException">A probability is smaller than a double can hold.</exception>
    /// <remarks>State reduction with three exits (Alfa, Xue and Ye 2002), O(n³) time for n states from which it is open.</remarks>
    /// <example><code>double repairedFirst = pool.Before("in repair", "lost").Probability("clean");</code></example>
    public static FirstOfTwo<TState> Before<TState>(this Chain<TState> chain, TState first, TState second)
        where TState : notnull => BeforeAny(chain, [first], [second], new SolveOptions());

    /// <summary>Finds, from every state, how likely one state is reached before another, with options.</summary>
    /// <typeparam name="TState">The type of a state.</typeparam>
    /// <param name="chain">Any chain.</param>
    /// <param name="first">The state that is to come first.</param>
    /// <param name="second">The state that must not come before it.</param>
    /// <param name="options">Evidence, cancellation and memory.</param>
    /// <exception cref="ArgumentException">Both are the same state.</exception>
    /// <exception cref="UnknownStateException">A label is none of the chain's states.</exception>
    /// <exception cref="MemoryLimitException">Too many states lie before the two for a direct solve.</exception>
    /// <exception cref="NumericalRangeException">A probability is smaller than a double can hold.</exception>
    /// <exception cref="OperationCanceledException">The token of the options was cancelled.</exception>
    public static FirstOfTwo<TState> Before<TState>(this Chain<TState> chain, TState first, TState second, SolveOptions options)
        where TState : notnull => BeforeAny(chain, [first], [second], options);

    /// <summary>Finds, from every state, how likely one of some states is reached before any of some others.</summary>
    /// <typeparam name="TState">The type of a state.</typeparam>
    /// <param name="chain">Any chain.</param>
    /// <param name="firsts">The states of which one is to come first; at least one.</param>
    /// <param name="seconds">The states that must not come before; at least one, none of them among the firsts.</param>
    /// <exception cref="ArgumentException">A set is empty, or a state is in both.</exception>
    /// <exception cref="UnknownStateException">A label is none of the chain's states.</exception>
    /// <exception cref="MemoryLimitException">Too many states lie before them for a direct solve.</exception>
    /// <exception cref="NumericalRangeException">A probability is smaller than a double can hold.</exception>
    /// <example><code>double keptInUse = pool.BeforeAny(["clean", "dirty"], ["lost", "scrapped"]).Probability("in repair");</code></example>
    public static FirstOfTwo<TState> BeforeAny<TState>(this Chain<TState> chain, IEnumerable<TState> firsts, IEnumerable<TState> seconds)
        where TState : notnull => BeforeAny(chain, firsts, seconds, new SolveOptions());

    /// <summary>Finds, from every state, how likely one of some states is reached before any of some others, with options.</summary>
    /// <typeparam name="TState">The type of a state.</typeparam>
    /// <param name="chain">Any chain.</param>
    /// <param name="firsts">The states of which one is to come first; at least one.</param>
    /// <param name="seconds">The states that must not come before; at least one, none of them among the firsts.</param>
    /// <param name="options">Evidence, cancellation and memory.</param>
    /// <exception cref="ArgumentException">A set is empty, or a state is in both.</exception>
    /// <exception cref="UnknownStateException">A label is none of the chain's states.</exception>
    /// <exception cref="MemoryLimitException">Too many states lie before them for a direct solve.</exception>
    /// <exception cref="NumericalRangeException">A probability is smaller than a double can hold.</exception>
    /// <exception cref="OperationCanceledException">The token of the options was cancelled.</exception>
    public static FirstOfTwo<TState> BeforeAny<TState>(
        this Chain<TState> chain, IEnumerable<TState> firsts, IEnumerable<TState> seconds, SolveOptions options)
        where TState : notnull
    {
        ArgumentNullException.ThrowIfNull(chain);
        ArgumentNullException.ThrowIfNull(firsts);
        ArgumentNullException.ThrowIfNull(seconds);
        ArgumentNullException.ThrowIfNull(options);
        options.CancellationToken.ThrowIfCancellationRequested();
        int[] first = [.. firsts.Select(chain.States.Require).Distinct()];
        int[] second = [.. seconds.Select(chain.States.Require).Distinct()];
        if (first.Length == 0 || second.Length == 0)
        {
            throw new ArgumentException(Messages.NoTargets, first.Length == 0 ? nameof(firsts) : nameof(seconds));
        }

        int[] both = [.. first.Intersect(second)];
        return both.Length == 0
            ? RaceSolve<TState>.Of(chain, first, second, options)
            : throw new ArgumentException(Messages.OnBothSides(chain.States[both[0]]), nameof(seconds));
    }

    /// <summary>Finds where things stand after a long time, given that they have not ended yet, and how fast they end.</summary>
    /// <typeparam name="TState">The type of a state.</typeparam>
    /// <param name="chain">A chain with transient states.</param>
    /// <returns>The quasi-stationary distribution with its decay rate.</returns>
    /// <exception cref="ChainStructureException">There are no transient states, or two classes of them are left equally slowly.</exception>
    /// <exception cref="ConvergenceException">Two parts of the transient states are left almost equally slowly.</exception>
    /// <exception cref="MemoryLimitException">There are too many transient states for a direct solve.</exception>
    /// <remarks>
    /// Inverse iteration with the factors of one state reduction: O(t³) for t transient states, then O(t²) for each iteration, at most 10,000.
    /// </remarks>
    /// <example><code>double dirtyAmongThoseInUse = pool.QuasiStationary()["dirty"];</code></example>
    public static QuasiStationaryDistribution<TState> QuasiStationary<TState>(this Chain<TState> chain)
        where TState : notnull => QuasiStationary(chain, new SolveOptions());

    /// <summary>Finds where things stand after a long time, given that they have not ended yet, with options.</summary>
    /// <typeparam name="TState">The type of a state.</typeparam>
    /// <param name="chain">A chain with transient states.</param>
    /// <param name="options">Evidence, cancellation and memory.</param>
    /// <exception cref="ChainStructureException">There are no transient states, or two classes of them are left equally slowly.</exception>
    /// <exception cref="ConvergenceException">Two parts of the transient states are left almost equally slowly.</exception>
    /// <exception cref="MemoryLimitException">There are too many transient states for a direct solve.</exception>
    /// <exception cref="OperationCanceledException">The token of the options was cancelled.</exception>
    public static QuasiStationaryDistribution<TState> QuasiStationary<TState>(this Chain<TState> chain, SolveOptions options)
        where TState : notnull
    {
        ArgumentNullException.ThrowIfNull(chain);
        ArgumentNullException.ThrowIfNull(options);
        return QuasiStationarySolve<TState>.Of(chain, options);
    }
}
