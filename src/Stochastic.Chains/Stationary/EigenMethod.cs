using Stochastic.Chains.Kernels;

namespace Stochastic.Chains;

/// <summary>The eigen method: the left eigenvector of the transition matrix for the eigenvalue closest to one.</summary>
/// <remarks>
/// Here for comparison: it subtracts, so its error grows with the condition of the chain, and its certificate shows what it loses. Real
/// Schur form by the shifted QR iteration (Golub and Van Loan, Matrix Computations, 4th ed. 2013, ch. 7), with a cap on its sweeps, so
/// that it always returns. O(n³) time, about ten times that of elimination, and 24 n² bytes.
/// </remarks>
/// <example><code>var shares = chain.Stationary(new EigenMethod());</code></example>
public sealed record EigenMethod : IStationaryMethod
{
    private const int BytesPerPair = 24;

    /// <inheritdoc/>
    public string Name => "eigenvector (QR iteration)";

    /// <inheritdoc/>
    /// <exception cref="MemoryLimitException">The class is too large for a dense decomposition.</exception>
    public StationaryVector Solve(StationaryProblem problem)
    {
        ArgumentNullException.ThrowIfNull(problem);
        var size = problem.StateCount;
        problem.Options.RequireMemory(size, BytesPerPair * (long)size * size);
        var matrix = new double[size * size];
        problem.Rates.CopyTo(new MatrixView(matrix, 0, size));
        for (var state = 0; state < size; state++)
        {
            matrix[(state * size) + state] = 1 - problem.Outflows[state];
        }

        var form = RealSchurForm.Of(matrix, size, balance: false, problem.Options.CancellationToken);
        if (!form.HasConverged)
        {
            return NotFound(form, "The QR iteration did not separate all eigenvalues within its cap, so no eigenvector was taken.");
        }

        var (_, vector) = SchurEigenvectors.LeftClosestTo(form, 1);
        if (vector.Any(entry => Math.Abs(entry.Imaginary) > Math.Abs(entry.Real)))
        {
            return NotFound(form, "The eigenvalues closest to one could not be told apart, so no eigenvector was taken.");
        }

        var total = vector.Sum(entry => entry.Real);
        return new StationaryVector(Array.ConvertAll(vector, entry => entry.Real / total))
        {
            HasConverged = true,
            Reason = "The left eigenvector for the eigenvalue closest to one.",
            Iterations = form.Sweeps,
        };
    }

    /// <summary>Without an eigenvector the uniform distribution stands in as the best that is known.</summary>
    private static StationaryVector NotFound(RealSchurForm form, string reason) => new(Enumerable.Repeat(1.0, form.Order).ToArray())
    {
        HasConverged = false,
        Reason = reason,
        Iterations = form.Sweeps,
        Advice = "Ask EliminationMethod.",
    };
}
