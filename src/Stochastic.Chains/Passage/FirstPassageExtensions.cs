using Stochastic.Chains.Kernels;
using Stochastic.Chains.Passage;

namespace Stochastic.Chains;

/// <summary>Questions about how long it takes from every state to every other.</summary>
public static class FirstPassageExtensions
{
    /// <summary>Finds the mean first passage times between all pairs of states, mean recurrence times on the diagonal.</summary>
    /// <typeparam name="TState">The type of a state.</typeparam>
    /// <param name="chain">Any chain.</param>
    /// <returns>The table with its certificate; +∞ where a state may never be reached.</returns>
    /// <exception cref="MemoryLimitException">The tables take more memory than allowed.</exception>
    /// <exception cref="NumericalRangeException">A mean time is finite but larger than a double can hold.</exception>
    /// <remarks>
    /// Recursive state reduction: one half of the states is eliminated before the other, as in state reduction (Grassmann, Taksar and Heyman
    /// 1985; Sheskin 1985), the times among the other half are found in the same way, and those from the eliminated half follow from them.
    /// Only additions, products and quotients of non-negative numbers, so that each time keeps its digits however rare the moves. The error
    /// bound is proved a priori (perturbation of censored chains: O'Cinneide 1993) and grows with states³; <see cref="FirstPassageTable{TState}.Refine"/>
    /// proves a column to almost the last digit. About 10/9 · states³ multiply-adds, and as many again less a tenth for the residual, which
    /// <see cref="CertificateLevel.None"/> saves; 24 · states² bytes of working memory and 8 · states² of result.
    /// </remarks>
    /// <example><code>double weeks = pump.MeanFirstPassage()["new", "failed"];</code></example>
    public static FirstPassageTable<TState> MeanFirstPassage<TState>(this Chain<TState> chain)
        where TState : notnull => MeanFirstPassage(chain, new SolveOptions());

    /// <summary>Finds the mean first passage times between all pairs of states, with options.</summary>
    /// <typeparam name="TState">The type of a state.</typeparam>
    /// <param name="chain">Any chain.</param>
    /// <param name="options">Evidence, threads, cancellation, progress and memory.</param>
    /// <returns>The table with its certificate; +∞ where a state may never be reached.</returns>
    /// <exception cref="MemoryLimitException">The tables take more memory than allowed.</exception>
    /// <exception cref="NumericalRangeException">A mean time is finite but larger than a double can hold.</exception>
    /// <exception cref="OperationCanceledException">The token of the options was cancelled.</exception>
    public static FirstPassageTable<TState> MeanFirstPassage<TState>(this Chain<TState> chain, SolveOptions options)
        where TState : notnull
    {
        ArgumentNullException.ThrowIfNull(chain);
        ArgumentNullException.ThrowIfNull(options);
        return FirstPassageSolve<TState>.Of(chain, options, InstructionSet.Widest);
    }
}
