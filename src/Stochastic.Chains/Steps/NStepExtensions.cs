using Stochastic.Chains.Internal;
using Stochastic.Chains.Steps;

namespace Stochastic.Chains;

/// <summary>Questions about all probabilities after some steps at once.</summary>
public static class NStepExtensions
{
    /// <summary>Computes the n-step transition matrix by the method that suits the chain and the number of steps.</summary>
    /// <typeparam name="TState">The type of a state.</typeparam>
    /// <param name="chain">The chain.</param>
    /// <param name="steps">The number of steps, 0 or more; 0 gives the identity, 1 the probabilities as given.</param>
    /// <returns>The matrix with its certificate, which says the method and why it was taken.</returns>
    /// <exception cref="ArgumentOutOfRangeException">The number of steps is negative.</exception>
    /// <exception cref="MemoryLimitException">The chain has too many states for a full matrix; ask StartingIn(…).After(n) for single rows.</exception>
    /// <remarks>
    /// Propagation where a few steps of a chain with few moves cost less than squaring; the spectrum for very many steps of a chain of at
    /// most 32 states, where it proves every entry to 12 digits; else repeated squaring. To ask about one start only,
    /// <c>StartingIn(…).After(n)</c> forms no matrix. O(states³ log n) at most.
    /// </remarks>
    /// <example><code>double failed = pump.NStep(52)["new", "failed"];</code></example>
    public static NStepMatrix<TState> NStep<TState>(this Chain<TState> chain, long steps)
        where TState : notnull => NStep(chain, steps, new SolveOptions());

    /// <summary>Computes the n-step transition matrix, with options.</summary>
    /// <typeparam name="TState">The type of a state.</typeparam>
    /// <param name="chain">The chain.</param>
    /// <param name="steps">The number of steps, 0 or more.</param>
    /// <param name="options">Evidence, memory, threads, cancellation and progress.</param>
    /// <exception cref="ArgumentOutOfRangeException">The number of steps is negative.</exception>
    /// <exception cref="MemoryLimitException">The matrix needs more memory than allowed.</exception>
    /// <exception cref="OperationCanceledException">The token of the options was cancelled.</exception>
    public static NStepMatrix<TState> NStep<TState>(this Chain<TState> chain, long steps, SolveOptions options)
        where TState : notnull
    {
        Require(chain, steps, options);
        return steps <= 1 ? OfFewSteps(chain, steps, options) : NStepChoice.Solve(chain, steps, options);
    }

    /// <summary>Computes the n-step transition matrix by one method.</summary>
    /// <typeparam name="TState">The type of a state.</typeparam>
    /// <param name="chain">The chain.</param>
    /// <param name="steps">The number of steps, 0 or more.</param>
    /// <param name="method">The method; its certificate shows what it loses on this chain.</param>
    /// <exception cref="ArgumentOutOfRangeException">The number of steps is negative.</exception>
    /// <exception cref="MemoryLimitException">The matrix needs more memory than allowed.</exception>
    public static NStepMatrix<TState> NStep<TState>(this Chain<TState> chain, long steps, NStepMethod method)
        where TState : notnull => NStep(chain, steps, method, new SolveOptions());

    /// <summary>Computes the n-step transition matrix by one method, with options.</summary>
    /// <typeparam name="TState">The type of a state.</typeparam>
    /// <param name="chain">The chain.</param>
    /// <param name="steps">The number of steps, 0 or more.</param>
    /// <param name="method">The method; its certificate shows what it loses on this chain.</param>
    /// <param name="options">Evidence, memory, threads, cancellation and progress.</param>
    /// <exception cref="ArgumentOutOfRangeException">The number of steps is negative.</exception>
    /// <exception cref="MemoryLimitException">The matrix needs more memory than allowed.</exception>
    /// <exception cref="OperationCanceledException">The token of the options was cancelled.</exception>
    public static NStepMatrix<TState> NStep<TState>(this Chain<TState> chain, long steps, NStepMethod method, SolveOptions options)
        where TState : notnull
    {
        ArgumentNullException.ThrowIfNull(method);
        Require(chain, steps, options);
        return steps <= 1 ? OfFewSteps(chain, steps, options) : method.Solve(chain, steps, "As asked.", options);
    }

    private static void Require<TState>(Chain<TState> chain, long steps, SolveOptions options)
        where TState : notnull
    {
        ArgumentNullException.ThrowIfNull(chain);
        ArgumentNullException.ThrowIfNull(options);
        chain.RequireCountedSteps();
        options.CancellationToken.ThrowIfCancellationRequested();
        if (steps < 0)
        {
            throw new ArgumentOutOfRangeException(nameof(steps), steps, Messages.NegativeSteps(steps));
        }
    }

    private static NStepMatrix<TState> OfFewSteps<TState>(Chain<TState> chain, long steps, SolveOptions options)
        where TState : notnull
    {
        var size = chain.StateCount;
        options.RequireMemory(size, sizeof(double) * (long)size * size);
        var values = new double[size * size];
        for (var row = 0; row < size; row++)
        {
            if (steps == 0)
            {
                values[(row * size) + row] = 1;
                continue;
            }

            foreach (var (column, probability) in chain.Matrix.Row(row))
            {
                values[(row * size) + column] = probability;
            }
        }

        var reason = steps == 0 ? "No step leaves everything where it is." : "One step is the chain as given.";
        var bounds = options.CertificateLevel == CertificateLevel.Proof ? NStepBounds.Exact : NStepBounds.None;
        return new NStepMatrix<TState>(chain.States, values, steps, bounds.ToCertificate("exact", reason, values, size, 0, options));
    }
}
