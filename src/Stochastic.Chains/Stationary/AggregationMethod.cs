using Stochastic.Chains.Kernels;
using Stochastic.Chains.Stationary;

namespace Stochastic.Chains;

/// <summary>Iterative aggregation and disaggregation: solves between groups of strongly coupled states, then inside them, in turn.</summary>
/// <remarks>
/// One iteration is one cycle: the masses of the groups by state reduction of the chain of groups, then several Gauss-Seidel sweeps
/// inside each group. A few cycles suffice on nearly decomposable chains, where the power method hardly moves. The groups are what
/// remains connected when moves below <see cref="CouplingThreshold"/> are ignored. O(transitions + groups³) a cycle. Sources:
/// Takahashi 1975; Koury, McAllister and Stewart 1984, SIAM J. Alg. Disc. Meth. 5, 164–186.
/// </remarks>
/// <example><code>var shares = chain.Stationary(new AggregationMethod { CouplingThreshold = 1e-3 });</code></example>
public sealed record AggregationMethod : IStationaryMethod
{
    /// <inheritdoc/>
    public string Name => "aggregation-disaggregation";

    /// <summary>
    /// Gets the tolerance: the iteration stops when the largest relative change of an entry, the changes still to come at the rate
    /// seen, and the relative residual are within it. Default: 10⁻¹².
    /// </summary>
    /// <exception cref="ArgumentOutOfRangeException">Set to a value not above 0 and below 1.</exception>
    public double Tolerance { get; init => field = IterationLimits.Tolerance(value); } = 1e-12;

    /// <summary>Gets the largest number of cycles. Default: 1,000.</summary>
    /// <exception cref="ArgumentOutOfRangeException">Set to less than 1.</exception>
    public int MaxIterations { get; init => field = IterationLimits.AtLeastOne(value); } = 1_000;

    /// <summary>Gets the part of a state's outflow below which a move does not tie two states into one group. Default: 0.01.</summary>
    /// <exception cref="ArgumentOutOfRangeException">Set to a value not above 0 and below 1.</exception>
    public double CouplingThreshold { get; init => field = IterationLimits.Tolerance(value); } = 0.01;

    /// <summary>Gets the number of sweeps inside a group in each cycle. Default: 8.</summary>
    /// <exception cref="ArgumentOutOfRangeException">Set to less than 1.</exception>
    public int SweepsPerCycle { get; init => field = IterationLimits.AtLeastOne(value); } = 8;

    /// <inheritdoc/>
    /// <exception cref="MemoryLimitException">The chain of groups is too large for a direct solve.</exception>
    public StationaryVector Solve(StationaryProblem problem)
    {
        ArgumentNullException.ThrowIfNull(problem);
        var groups = CoupledGroups.Find(problem, CouplingThreshold);
        var reason = groups.Count switch
        {
            1 => "No groups were found at this threshold, so only sweeps were made.",
            _ => FormattableString.Invariant($"{groups.Count:N0} groups of strongly coupled states were found and solved in turn with the moves between them."),
        };
        return StationaryIteration.Run(problem, Tolerance, MaxIterations, reason, current =>
        {
            if (groups.Count > 1)
            {
                GroupMasses.Rescale(problem, groups, current);
            }

            SweepGroups(problem, groups, current);
        });
    }

    private void SweepGroups(StationaryProblem problem, Components groups, double[] values)
    {
        foreach (var members in groups.Members())
        {
            for (var sweep = 0; sweep < SweepsPerCycle; sweep++)
            {
                foreach (var state in members)
                {
                    values[state] = StationaryIteration.Inflow(problem, values, state) / problem.Outflows[state];
                }
            }
        }
    }
}
