using Stochastic.Chains.Internal;
using Stochastic.Chains.Steps;

namespace Stochastic.Chains;

/// <summary>A chain together with where it starts: one state, or shares of several.</summary>
/// <typeparam name="TState">The type of a state.</typeparam>
/// <remarks>Immutable and safe for concurrent use.</remarks>
/// <example>
/// <code>
/// ChainStart&lt;string&gt; stock = chain.StartingIn(Distribution.FromWeights(chain.States, ("clean", 1200), ("dirty", 310)));
/// var inFourWeeks = stock.After(4);
/// </code>
/// </example>
public sealed class ChainStart<TState>
    where TState : notnull
{
    internal ChainStart(Chain<TState> chain, Distribution<TState> distribution)
    {
        Chain = chain;
        Distribution = distribution;
    }

    /// <summary>Gets the chain.</summary>
    public Chain<TState> Chain { get; }

    /// <summary>Gets where it starts.</summary>
    public Distribution<TState> Distribution { get; }

    /// <summary>Finds where things stand after a number of steps.</summary>
    /// <param name="steps">The number of steps, 0 or more.</param>
    /// <returns>The distribution with its certificate.</returns>
    /// <exception cref="ArgumentOutOfRangeException">The number of steps is negative.</exception>
    /// <remarks>
    /// One multiplication of the distribution with the chain for each step: O(transitions) a step, and no power of the matrix is
    /// formed. Stops early, with the same answer, when a step changes nothing any more.
    /// </remarks>
    /// <example><code>double washed = chain.StartingIn("dirty").After(4)["clean"];</code></example>
    public StepDistribution<TState> After(long steps) => After(steps, new SolveOptions());

    /// <summary>Finds where things stand after a number of steps, with options.</summary>
    /// <param name="steps">The number of steps, 0 or more.</param>
    /// <param name="options">Evidence, cancellation and progress.</param>
    /// <exception cref="ArgumentOutOfRangeException">The number of steps is negative.</exception>
    /// <exception cref="OperationCanceledException">The token of the options was cancelled.</exception>
    public StepDistribution<TState> After(long steps, SolveOptions options)
    {
        ArgumentNullException.ThrowIfNull(options);
        if (steps < 0)
        {
            throw new ArgumentOutOfRangeException(nameof(steps), steps, Messages.NegativeSteps(steps));
        }

        return Propagation<TState>.Run(this, steps, options);
    }

    /// <summary>A small table of the start, the same in every culture.</summary>
    public override string ToString() => Distribution.ToString();
}
