using MathNet.Numerics.Providers.LinearAlgebra;

namespace Stochastic.Chains;

/// <summary>The linear system method: the balance equations with one replaced by the sum, solved by LU decomposition.</summary>
/// <remarks>
/// What a textbook does first, and here for comparison: it subtracts, so its error grows with the condition of the chain, and its
/// certificate shows what it loses. MathNet.Numerics' managed LU with partial pivoting. O(n³) time and 8 n² bytes. Cancellation is
/// honoured before and after the decomposition only.
/// </remarks>
/// <example><code>var shares = chain.Stationary(new LinearSystemMethod());</code></example>
public sealed record LinearSystemMethod : IStationaryMethod
{
    /// <inheritdoc/>
    public string Name => "linear system (LU)";

    /// <inheritdoc/>
    /// <exception cref="MemoryLimitException">The class is too large for a dense decomposition.</exception>
    public StationaryVector Solve(StationaryProblem problem)
    {
        ArgumentNullException.ThrowIfNull(problem);
        var size = problem.StateCount;
        problem.Options.RequireMemory(size, sizeof(double) * (long)size * size);
        problem.Options.CancellationToken.ThrowIfCancellationRequested();

        // Column-major: column "from" holds the balance of every state but the last, whose equation is the sum of all shares.
        var system = new double[size * size];
        for (var from = 0; from < size; from++)
        {
            var column = system.AsSpan(from * size, size);
            foreach (var (to, probability) in problem.MovesFrom(from))
            {
                column[to] = -probability;
            }

            column[from] = problem.Outflows[from];
            column[^1] = 1;
        }

        var values = new double[size];
        values[^1] = 1;
        var pivots = new int[size];
        var provider = ManagedLinearAlgebraProvider.Instance;
        provider.LUFactor(system, size, pivots);
        problem.Options.CancellationToken.ThrowIfCancellationRequested();
        provider.LUSolveFactored(1, system, size, pivots, values);
        return new StationaryVector(values) { HasConverged = true, Reason = "Balance equations with one replaced by the sum, by LU decomposition." };
    }
}
