using Stochastic.Chains.Kernels;
using Stochastic.Chains.Stationary;

namespace Stochastic.Chains;

/// <summary>Another method, whose shares are then refined until each is right to the last digits, with a proof, where that is possible.</summary>
/// <remarks>
/// What the shares leave unbalanced is computed in twice the precision and solved for, with factors free of subtraction, in up to eight steps;
/// each counts only if its proved error is smaller. The shares may be far off at first, as those of a few steps of the power method are,
/// but their sizes must be about right: refinement contracts while the expected number of jumps until the largest share is reached is well
/// below 10¹⁵. Where it does not, the shares stay as they are and the certificate says so. Shares that are proved to be as good already are
/// left alone. Takes one elimination, O(n³) time and 8 n² bytes, beside what the method takes. Source: Higham, Accuracy and Stability
/// of Numerical Algorithms, 2nd ed. 2002, ch. 12.
/// </remarks>
/// <example><code>var shares = chain.Stationary(new PolishedMethod(new LinearSystemMethod())).Require(relativeError: 1e-15);</code></example>
public sealed record PolishedMethod : IStationaryMethod
{
    /// <summary>Polishes the shares of a method.</summary>
    /// <param name="method">A built-in method, or one of your own.</param>
    public PolishedMethod(IStationaryMethod method)
    {
        ArgumentNullException.ThrowIfNull(method);
        Method = method;
    }

    /// <summary>Gets the method whose shares are polished.</summary>
    public IStationaryMethod Method { get; }

    /// <inheritdoc/>
    public string Name => $"{Method.Name}, polished";

    /// <inheritdoc/>
    /// <exception cref="MemoryLimitException">The class is too large for a dense elimination.</exception>
    public StationaryVector Solve(StationaryProblem problem)
    {
        ArgumentNullException.ThrowIfNull(problem);
        problem.Options.RequireMemory(problem.StateCount, sizeof(double) * (long)problem.StateCount * problem.StateCount);
        var vector = Method.Solve(problem);
        var raw = vector.Values.Span;
        if (vector.ProvedBound <= DoubledElimination.GoodEnough || raw.Length != problem.StateCount)
        {
            return vector;
        }

        var order = problem.Members.ToArray();
        var largest = VectorLoops.IndexOfLargest(raw);
        (order[largest], order[^1]) = (order[^1], order[largest]);
        var values = problem.Spread(raw);
        using var reduced = ReducedClass.TryReduce(problem, order, InstructionSet.Widest);
        var bound = reduced?.Refine(problem, values, RefinementReach.Anywhere) ?? double.PositiveInfinity;
        return bound <= DoubledElimination.GoodEnough
            ? vector with
            {
                Values = problem.Select(values),
                HasConverged = true,
                Reason = $"{vector.Reason} Then refined in twice the precision, with factors free of subtraction.",
                ProvedBasis = ErrorBasis.RefinedMonotone,
                ProvedBound = bound,
            }
            : vector with { Reason = $"{vector.Reason} Left as it was: refinement does not help here." };
    }
}
