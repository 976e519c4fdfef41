using Stochastic.Chains.Internal;
using Stochastic.Chains.Stationary;

namespace Stochastic.Chains;

/// <summary>Questions about where a chain settles.</summary>
public static class StationaryExtensions
{
    /// <summary>Finds the long-run share of time in each state of a chain with one recurrent class.</summary>
    /// <typeparam name="TState">The type of a state.</typeparam>
    /// <param name="chain">The chain; it may have transient states (their share is exactly zero) and may be periodic.</param>
    /// <returns>The stationary distribution with its certificate.</returns>
    /// <exception cref="ChainStructureException">The chain has several recurrent classes, so the shares depend on the start.</exception>
    /// <exception cref="MemoryLimitException">The recurrent class is too large for a direct solve.</exception>
    /// <exception cref="NumericalRangeException">A share is smaller than the smallest normal double.</exception>
    /// <remarks>
    /// State reduction (Grassmann, Taksar and Heyman 1985): nothing is subtracted, so small shares come out with as many correct
    /// digits as large ones. O(n³) time and 8 n² bytes for n recurrent states.
    /// </remarks>
    /// <example><code>double inRepair = chain.Stationary()["in repair"];</code></example>
    public static StationaryDistribution<TState> Stationary<TState>(this Chain<TState> chain)
        where TState : notnull => Stationary(chain, new SolveOptions());

    /// <summary>Finds the long-run share of time in each state of a chain with one recurrent class, with options.</summary>
    /// <typeparam name="TState">The type of a state.</typeparam>
    /// <param name="chain">The chain; it may have transient states and may be periodic.</param>
    /// <param name="options">Evidence, cancellation, progress and memory.</param>
    /// <exception cref="ChainStructureException">The chain has several recurrent classes, so the shares depend on the start.</exception>
    /// <exception cref="MemoryLimitException">The recurrent class is too large for a direct solve.</exception>
    /// <exception cref="NumericalRangeException">A share is smaller than the smallest normal double.</exception>
    /// <exception cref="OperationCanceledException">The token of the options was cancelled.</exception>
    public static StationaryDistribution<TState> Stationary<TState>(this Chain<TState> chain, SolveOptions options)
        where TState : notnull
    {
        ArgumentNullException.ThrowIfNull(chain);
        ArgumentNullException.ThrowIfNull(options);
        var recurrent = chain.Structure().RecurrentClasses;
        return recurrent.Count == 1
            ? StationarySolve<TState>.OfClass(chain, recurrent[0], options)
            : throw new ChainStructureException(
                Messages.SeveralRecurrentClasses([.. recurrent.Select(group => group.ToString())]), recurrent.Select(group => (object)group.States[0]));
    }

    /// <summary>Finds, for each recurrent class, the long-run share of time in its states once the class is entered.</summary>
    /// <typeparam name="TState">The type of a state.</typeparam>
    /// <param name="chain">Any chain.</param>
    /// <returns>One distribution for each recurrent class, in the order of <see cref="ChainStructure{TState}.RecurrentClasses"/>; zero outside the class.</returns>
    /// <example><code>IReadOnlyList&lt;StationaryDistribution&lt;string&gt;&gt; ends = chain.StationaryPerClass();</code></example>
    public static IReadOnlyList<StationaryDistribution<TState>> StationaryPerClass<TState>(this Chain<TState> chain)
        where TState : notnull => StationaryPerClass(chain, new SolveOptions());

    /// <summary>Finds, for each recurrent class, the long-run share of time in its states once the class is entered, with options.</summary>
    /// <typeparam name="TState">The type of a state.</typeparam>
    /// <param name="chain">Any chain.</param>
    /// <param name="options">Evidence, cancellation, progress and memory.</param>
    /// <exception cref="MemoryLimitException">A recurrent class is too large for a direct solve.</exception>
    /// <exception cref="NumericalRangeException">A share is smaller than the smallest normal double.</exception>
    /// <exception cref="OperationCanceledException">The token of the options was cancelled.</exception>
    public static IReadOnlyList<StationaryDistribution<TState>> StationaryPerClass<TState>(this Chain<TState> chain, SolveOptions options)
        where TState : notnull
    {
        ArgumentNullException.ThrowIfNull(chain);
        ArgumentNullException.ThrowIfNull(options);
        return [.. chain.Structure().RecurrentClasses.Select(group => StationarySolve<TState>.OfClass(chain, group, options))];
    }
}
