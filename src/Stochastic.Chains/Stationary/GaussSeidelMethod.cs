using Stochastic.Chains.Stationary;

namespace Stochastic.Chains;

/// <summary>The Gauss-Seidel method: balances one state after the other, using each new figure at once.</summary>
/// <remarks>
/// One iteration is one sweep over all states, O(transitions): each share becomes its inflow divided by its outflow, which subtracts
/// nothing. Where the sweeps go round in circles instead of settling, they are relaxed to three quarters. Source: Stewart,
/// Introduction to the Numerical Solution of Markov Chains, 1994, ch. 3.
/// </remarks>
/// <example><code>var shares = chain.Stationary(new GaussSeidelMethod { MaxIterations = 500 });</code></example>
public sealed record GaussSeidelMethod : IStationaryMethod
{
    private const int SweepsWithoutGain = 50;
    private const double Relaxed = 0.75;

    /// <inheritdoc/>
    public string Name => "Gauss-Seidel method";

    /// <summary>
    /// Gets the tolerance: the iteration stops when the largest relative change of an entry, the changes still to come at the rate
    /// seen, and the relative residual are within it. Default: 10⁻¹².
    /// </summary>
    /// <exception cref="ArgumentOutOfRangeException">Set to a value not above 0 and below 1.</exception>
    public double Tolerance { get; init => field = IterationLimits.Tolerance(value); } = 1e-12;

    /// <summary>Gets the largest number of sweeps. Default: 10,000.</summary>
    /// <exception cref="ArgumentOutOfRangeException">Set to less than 1.</exception>
    public int MaxIterations { get; init => field = IterationLimits.AtLeastOne(value); } = 10_000;

    /// <inheritdoc/>
    public StationaryVector Solve(StationaryProblem problem)
    {
        ArgumentNullException.ThrowIfNull(problem);
        var relaxation = 1.0;
        var least = double.PositiveInfinity;
        var withoutGain = 0;
        return StationaryIteration.Run(problem, Tolerance, MaxIterations, "Balanced state by state until nothing changed beyond the tolerance.", current =>
        {
            var change = Sweep(problem, current, relaxation);
            withoutGain = change < least ? 0 : withoutGain + 1;
            least = Math.Min(least, change);
            if (withoutGain >= SweepsWithoutGain)
            {
                relaxation = Relaxed;
            }
        });
    }

    private static double Sweep(StationaryProblem problem, double[] values, double relaxation)
    {
        var largest = 0.0;
        for (var state = 0; state < values.Length; state++)
        {
            var balanced = StationaryIteration.Inflow(problem, values, state) / problem.Outflows[state];
            var updated = relaxation == 1 ? balanced : ((1 - relaxation) * values[state]) + (relaxation * balanced);
            largest = Math.Max(largest, Math.Abs(updated - values[state]) / updated);
            values[state] = updated;
        }

        return largest;
    }
}
