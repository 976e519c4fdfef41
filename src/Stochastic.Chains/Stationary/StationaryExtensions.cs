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
    /// <exception cref="ConvergenceException">The chain is too large for a direct solve and the iteration did not reach its tolerance.</exception>
    /// <exception cref="MemoryLimitException">The recurrent class is too large.</exception>
    /// <exception cref="NumericalRangeException">A share is smaller than a double can hold.</exception>
    /// <remarks>
    /// The method is chosen by a rule. One recurrent state: the structure answers. Up to 5,000 recurrent states whose table fits into
    /// <see cref="SolveOptions.MemoryLimit"/>: <see cref="EliminationMethod"/>, which keeps nearly all digits of every share. Larger:
    /// <see cref="AggregationMethod"/>. The certificate says which was taken and why.
    /// </remarks>
    /// <example><code>double inRepair = chain.Stationary()["in repair"];</code></example>
    public static StationaryDistribution<TState> Stationary<TState>(this Chain<TState> chain)
        where TState : notnull => Stationary(chain, new SolveOptions());

    /// <summary>Finds the long-run share of time in each state of a chain with one recurrent class, with options.</summary>
    /// <typeparam name="TState">The type of a state.</typeparam>
    /// <param name="chain">The chain; it may have transient states and may be periodic.</param>
    /// <param name="options">Evidence, cancellation, progress, threads and memory.</param>
    /// <exception cref="ChainStructureException">The chain has several recurrent classes, so the shares depend on the start.</exception>
    /// <exception cref="ConvergenceException">An iterative method ended before it reached its tolerance.</exception>
    /// <exception cref="MemoryLimitException">The recurrent class is too large for the method.</exception>
    /// <exception cref="NumericalRangeException">A share is smaller than a double can hold, or the method lost its sign.</exception>
    /// <exception cref="OperationCanceledException">The token of the options was cancelled.</exception>
    public static StationaryDistribution<TState> Stationary<TState>(this Chain<TState> chain, SolveOptions options)
        where TState : notnull
    {
        ArgumentNullException.ThrowIfNull(chain);
        ArgumentNullException.ThrowIfNull(options);
        return Converged(Solve(chain, method: null, options));
    }

    /// <summary>Finds the long-run share of time in each state of a chain with one recurrent class, by a given method.</summary>
    /// <typeparam name="TState">The type of a state.</typeparam>
    /// <param name="chain">The chain; it may have transient states and may be periodic.</param>
    /// <param name="method">A built-in method, or one of your own.</param>
    /// <exception cref="ChainStructureException">The chain has several recurrent classes, so the shares depend on the start.</exception>
    /// <exception cref="ConvergenceException">An iterative method ended before it reached its tolerance.</exception>
    /// <exception cref="MemoryLimitException">The recurrent class is too large for the method.</exception>
    /// <exception cref="NumericalRangeException">A share is smaller than a double can hold, or the method lost its sign.</exception>
    /// <example><code>var shares = chain.Stationary(new PowerMethod { Tolerance = 1e-10 });</code></example>
    public static StationaryDistribution<TState> Stationary<TState>(this Chain<TState> chain, IStationaryMethod method)
        where TState : notnull => Stationary(chain, method, new SolveOptions());

    /// <summary>Finds the long-run share of time in each state of a chain with one recurrent class, by a given method, with options.</summary>
    /// <typeparam name="TState">The type of a state.</typeparam>
    /// <param name="chain">The chain; it may have transient states and may be periodic.</param>
    /// <param name="method">A built-in method, or one of your own.</param>
    /// <param name="options">Evidence, cancellation, progress, threads and memory.</param>
    /// <exception cref="ChainStructureException">The chain has several recurrent classes, so the shares depend on the start.</exception>
    /// <exception cref="ConvergenceException">An iterative method ended before it reached its tolerance.</exception>
    /// <exception cref="MemoryLimitException">The recurrent class is too large for the method.</exception>
    /// <exception cref="NumericalRangeException">A share is smaller than a double can hold, or the method lost its sign.</exception>
    /// <exception cref="OperationCanceledException">The token of the options was cancelled.</exception>
    public static StationaryDistribution<TState> Stationary<TState>(this Chain<TState> chain, IStationaryMethod method, SolveOptions options)
        where TState : notnull
    {
        ArgumentNullException.ThrowIfNull(chain);
        ArgumentNullException.ThrowIfNull(method);
        ArgumentNullException.ThrowIfNull(options);
        return Converged(Solve(chain, method, options));
    }

    /// <summary>Finds the long-run shares by a given method, and says whether it converged instead of throwing.</summary>
    /// <typeparam name="TState">The type of a state.</typeparam>
    /// <param name="chain">The chain; it may have transient states and may be periodic.</param>
    /// <param name="method">A built-in method, or one of your own.</param>
    /// <param name="options">Evidence, cancellation, progress, threads and memory.</param>
    /// <param name="shares">The distribution, or the best that was reached, with its certificate either way.</param>
    /// <returns>Whether the method reached its tolerance.</returns>
    /// <exception cref="ChainStructureException">The chain has several recurrent classes, so the shares depend on the start.</exception>
    /// <exception cref="MemoryLimitException">The recurrent class is too large for the method.</exception>
    /// <exception cref="NumericalRangeException">A share is smaller than a double can hold, or the method lost its sign.</exception>
    /// <exception cref="OperationCanceledException">The token of the options was cancelled.</exception>
    /// <example>
    /// <code>
    /// if (!chain.TryStationary(new PowerMethod(), new SolveOptions(), out var shares)) { Console.WriteLine(shares.Certificate); }
    /// </code>
    /// </example>
    public static bool TryStationary<TState>(this Chain<TState> chain, IStationaryMethod method, SolveOptions options, out StationaryDistribution<TState> shares)
        where TState : notnull
    {
        ArgumentNullException.ThrowIfNull(chain);
        ArgumentNullException.ThrowIfNull(method);
        ArgumentNullException.ThrowIfNull(options);
        (shares, var advice) = Solve(chain, method, options);
        return advice is null;
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
        return [.. chain.Structure().RecurrentClasses.Select(group => Converged(StationarySolve<TState>.Run(chain, group, given: null, options)))];
    }

    private static (StationaryDistribution<TState> Shares, string? Advice) Solve<TState>(Chain<TState> chain, IStationaryMethod? method, SolveOptions options)
        where TState : notnull
    {
        var recurrent = chain.Structure().RecurrentClasses;
        return recurrent.Count == 1
            ? StationarySolve<TState>.Run(chain, recurrent[0], method, options)
            : throw new ChainStructureException(
                Messages.SeveralRecurrentClasses([.. recurrent.Select(group => group.ToString())]), recurrent.Select(group => (object)group.States[0]));
    }

    private static StationaryDistribution<TState> Converged<TState>((StationaryDistribution<TState> Shares, string? Advice) outcome)
        where TState : notnull
    {
        if (outcome.Advice is not { } advice)
        {
            return outcome.Shares;
        }

        var certificate = outcome.Shares.Certificate;
        throw new ConvergenceException(
            Messages.NotConverged(certificate.Method, certificate.Iterations, certificate.Residual, advice), outcome.Shares.ToArray(), certificate, advice);
    }
}
