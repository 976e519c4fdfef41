using Stochastic.Chains.Kernels;

namespace Stochastic.Chains;

/// <summary>State reduction: eliminates one state after the other without ever subtracting.</summary>
/// <remarks>
/// Every share comes out with nearly all its digits, however small it is and however slowly the chain mixes; the order of the states
/// does not matter. Where a product would leave the range of a double, the reduction is repeated with wider exponents. Where a proof
/// is asked for and the class has at most 500 states, it is repeated in twice the precision when nothing cheaper proves a few units of
/// rounding. O(n³) time and 8 n² bytes. Sources: Grassmann, Taksar and Heyman 1985, Operations Research 33, 1107–1116; Sheskin 1985,
/// Operations Research 33, 228–235.
/// </remarks>
/// <example><code>var shares = chain.Stationary(new EliminationMethod());</code></example>
public sealed record EliminationMethod : IStationaryMethod
{
    private const int LargestDoubled = 500;
    private const int WideBytes = 16;
    private const int DoubledBytes = 32;

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
        if (problem.Options.CertificateLevel == CertificateLevel.Proof && problem.StateCount <= LargestDoubled)
        {
            return SolveDoubled(problem);
        }

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
                ProvedBasis = ErrorBasis.SubtractionFree,
                ProvedBound = ReductionBound.OfStationary(size),
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
        var total = weights.Aggregate((sum, weight) => sum + weight);
        return new StationaryVector(Array.ConvertAll(weights, weight => (weight / total).ToDouble()))
        {
            HasConverged = true,
            Reason = "Direct and free of subtraction; repeated with wider exponents because some products lie outside the range of a double.",
            ProvedBasis = ErrorBasis.SubtractionFree,
            ProvedBound = SubtractionFreeBound.OfElimination(size - 1, size, merges: 0),
        };
    }

    private static StationaryVector SolveDoubled(StationaryProblem problem)
    {
        var size = problem.StateCount;
        problem.Options.RequireMemory(size, DoubledBytes * (long)size * size);
        var table = problem.Rates.ToArray<ScaledDoubleDouble>(rate => rate);
        var reduction = new GeneralReduction<ScaledDoubleDouble>(table, size, size, size - 1);
        if (!DoubledElimination.TryEliminate(table, size, size, reduction.Sums, problem.Options.CancellationToken))
        {
            reduction.Eliminate(problem.Options.Report("elimination"), problem.Options.CancellationToken);
        }

        var weights = new ScaledDoubleDouble[size];
        weights[^1] = 1;
        reduction.ExtendLeft(weights);
        var total = weights.Aggregate((sum, weight) => sum + weight);
        return new StationaryVector(Array.ConvertAll(weights, weight => (weight / total).ToDouble()))
        {
            HasConverged = true,
            Reason = "Direct and free of subtraction, in twice the precision, then rounded once.",
            ProvedBasis = ErrorBasis.DoubledElimination,
            ProvedBound = DoubledElimination.RelativeErrorBound(size - 1, size, merges: 0),
        };
    }
}
