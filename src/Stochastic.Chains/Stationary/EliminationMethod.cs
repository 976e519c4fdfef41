using Stochastic.Chains.Kernels;
using Stochastic.Chains.Stationary;

namespace Stochastic.Chains;

/// <summary>State reduction: eliminates one state after the other without ever subtracting.</summary>
/// <remarks>
/// Every share comes out with nearly all its digits, however small it is and however slowly the chain mixes; the order of the states
/// does not matter. Where a proof is asked for, the shares are refined to a few units of rounding; where refinement cannot help, the
/// elimination of a class of up to <see cref="MaxDoubledStates"/> states is repeated in twice the precision. Where a product would leave the range of a double,
/// it is repeated with wider exponents. O(n³) time and 8 n² bytes. Sources: Grassmann, Taksar and Heyman 1985, Operations Research 33,
/// 1107–1116; Sheskin 1985, Operations Research 33, 228–235.
/// </remarks>
/// <example><code>var shares = chain.Stationary(new EliminationMethod());</code></example>
public sealed record EliminationMethod : IStationaryMethod
{
    /// <inheritdoc/>
    public string Name => "state reduction";

    /// <summary>
    /// Gets the largest class whose elimination is repeated in twice the precision when refinement does not prove the shares to a few
    /// units of rounding: about ten times the work, and 32 n² bytes. Default: 500.
    /// </summary>
    /// <exception cref="ArgumentOutOfRangeException">Set to a negative number.</exception>
    public int MaxDoubledStates
    {
        get;
        init
        {
            ArgumentOutOfRangeException.ThrowIfNegative(value);
            field = value;
        }
    }
    = DoubledElimination.MostStates;

    /// <summary>The vectors to compute with; tests force each kind.</summary>
    internal InstructionSet Instructions { get; init; } = InstructionSet.Widest;

    /// <inheritdoc/>
    /// <exception cref="MemoryLimitException">The class is too large for a dense elimination.</exception>
    public StationaryVector Solve(StationaryProblem problem)
    {
        ArgumentNullException.ThrowIfNull(problem);
        problem.Options.RequireMemory(problem.StateCount, sizeof(double) * (long)problem.StateCount * problem.StateCount);
        return StationaryElimination.Solve(problem, Instructions, MaxDoubledStates);
    }
}
