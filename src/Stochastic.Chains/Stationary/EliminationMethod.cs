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
    /// <inheritdoc/>
    public string Name => "state reduction";

    /// <inheritdoc/>
    /// <exception cref="MemoryLimitException">The class is too large for a dense elimination.</exception>
    public StationaryVector Solve(StationaryProblem problem)
    {
        ArgumentNullException.ThrowIfNull(problem);
        var size = problem.StateCount;
        var table = RateTable.Square(problem.Matrix, problem.Members, problem.Options);
        var reduction = new GeneralReduction<ScaledDouble>(table, size, size, size - 1);
        reduction.Eliminate(problem.Options.Report("elimination"), problem.Options.CancellationToken);
        var weights = new ScaledDouble[size];
        weights[^1] = ScaledDouble.One;
        reduction.ExtendLeft(weights);
        var largest = weights.Max(weight => weight.Exponent);
        return new StationaryVector(Array.ConvertAll(weights, weight => weight.ToDouble(-largest)))
        {
            HasConverged = true,
            Reason = "Direct and free of subtraction: every share keeps its digits.",
        };
    }
}
