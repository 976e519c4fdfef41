using Stochastic.Chains.Stationary;

namespace Stochastic.Chains;

/// <summary>The power method: steps the chain until the distribution no longer changes.</summary>
/// <remarks>
/// One iteration is one step, O(transitions). Converges like the second largest modulus of an eigenvalue: slow on nearly decomposable
/// chains. A periodic class is stepped lazily (half a step, half a stay), which has the same stationary distribution. Source: Stewart,
/// Introduction to the Numerical Solution of Markov Chains, 1994, ch. 3.
/// </remarks>
/// <example><code>var shares = chain.Stationary(new PowerMethod { Tolerance = 1e-10 });</code></example>
public sealed record PowerMethod : IStationaryMethod
{
    /// <inheritdoc/>
    public string Name => "power method";

    /// <summary>
    /// Gets the tolerance: the iteration stops when the largest relative change of an entry, the changes still to come at the rate
    /// seen, and the relative residual are within it. Default: 10⁻¹².
    /// </summary>
    /// <exception cref="ArgumentOutOfRangeException">Set to a value not above 0 and below 1.</exception>
    public double Tolerance { get; init => field = IterationLimits.Tolerance(value); } = 1e-12;

    /// <summary>Gets the largest number of steps. Default: 100,000.</summary>
    /// <exception cref="ArgumentOutOfRangeException">Set to less than 1.</exception>
    public int MaxIterations { get; init => field = IterationLimits.AtLeastOne(value); } = 100_000;

    /// <inheritdoc/>
    public StationaryVector Solve(StationaryProblem problem)
    {
        ArgumentNullException.ThrowIfNull(problem);
        var isLazy = problem.Period > 1;
        var next = new double[problem.StateCount];
        var reason = isLazy
            ? "Stepped lazily, half a step and half a stay, because the class is periodic."
            : "Stepped until nothing changed beyond the tolerance.";
        return StationaryIteration.Run(problem, Tolerance, MaxIterations, reason, current =>
        {
            problem.Step(current, next);
            for (var k = 0; k < current.Length; k++)
            {
                current[k] = isLazy ? (current[k] + next[k]) / 2 : next[k];
            }
        });
    }
}
