using Stochastic.Chains.Kernels;

namespace Stochastic.Chains;

/// <summary>State reduction: eliminates one state after the other without ever subtracting.</summary>
/// <remarks>
/// Every share comes out with nearly all its digits, however small it is and however slowly the chain mixes; the order of the states
/// does not matter. Where a product would leave the range of a double, the reduction is repeated with wider exponents. O(n³) time and
/// 8 n² bytes. Sources: Grassmann, Taksar and Heyman 1985, Operations Research 33, 1107–1116; Sheskin 1985, Operations Research 33,
/// 228–235.
/// </remarks>
/// <example><code>var shares = chain.Stationary(new EliminationMethod());</code></example>
public sealed record EliminationMethod : IStationaryMethod
{
    private const int WideBytes = 16;

    /// <inheritdoc/>
    public string Name => "state reduction";

    /// <summary>The vectors to compute with; tests force each kind.</summary>
    internal InstructionSet Instructions { get; init; } = InstructionSet.Widest;

    /// <inheritdoc/>
    /// <exception cref="MemoryLimitException">The class is too large for a dense elimination.</exception>
    public StationaryVector Solve(StationaryProblem problem)
    {
        ArgumentNullException.ThrowIfNull(problem);
        problem.Options.RequireMemory(problem.StateCount, sizeof(double) * (long)problem.StateCount * problem.StateCount);
        return SolveFast(problem) ?? SolveWide(problem);
    }

    private StationaryVector? SolveFast(StationaryProblem problem)
    {
        var size = problem.StateCount;
        using var table = WorkTable.Rent(size, size);
        problem.Rates.CopyTo(table.View);
        var sums = new double[size - 1];
        var values = new double[size];
        return StateReduction.Eliminate(
                table.View, size, size, size - 1, sums, problem.Options.Parallelism, Instructions, problem.Options.CancellationToken)
            && ReductionSolve.Stationary(table.View, size, values)
            ? new StationaryVector(values)
            {
                HasConverged = true,
                Reason = "Direct and free of subtraction: every share keeps its digits.",
                AprioriBound = ReductionBound.OfStationary(size),
            }
            : null;
    }

    private static StationaryVector SolveWide(StationaryProblem problem)
    {
        var size = problem.StateCount;
        problem.Options.RequireMemory(size, WideBytes * (long)size * size);
        var reduction = new GeneralReduction<ScaledDouble>(problem.Rates.ToArray<ScaledDouble>(rate => rate), size, size, size - 1);
        reduction.Eliminate(problem.Options.Report("elimination"), problem.Options.CancellationToken);
        var weights = new ScaledDouble[size];
        weights[^1] = ScaledDouble.One;
        reduction.ExtendLeft(weights);
        var largest = weights.Max(weight => weight.Exponent);
        return new StationaryVector(Array.ConvertAll(weights, weight => weight.ToDouble(-largest)))
        {
            HasConverged = true,
            Reason = "Direct and free of subtraction; repeated with wider exponents because some products lie outside the range of a double.",
            AprioriBound = SubtractionFreeBound.OfElimination(size - 1, size, merges: 0),
        };
    }
}
