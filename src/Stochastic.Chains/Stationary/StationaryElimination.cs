using Stochastic.Chains.Kernels;

namespace Stochastic.Chains.Stationary;

/// <summary>The ways to eliminate, from the fastest to the most careful; each is left for the next where it cannot do what is asked.</summary>
internal static class StationaryElimination
{
    private const int WideBytes = 16;
    private const double SmallReference = 1.0 / 16;

    internal static StationaryVector Solve(StationaryProblem problem, InstructionSet instructions, int mostDoubled)
    {
        var mustProve = problem.Options.CertificateLevel == CertificateLevel.Proof;
        var order = problem.Members.ToArray();
        var fast = SolveFast(problem, order, instructions, mustProve);
        if (fast is not null && (!mustProve || fast.ProvedBound <= DoubledElimination.GoodEnough))
        {
            return fast;
        }

        // Refinement contracts when the state that is kept has a large share.
        if (fast is not null && VectorLoops.IndexOfLargest(fast.Values.Span) is var largest && fast.Values.Span[^1] < SmallReference * fast.Values.Span[largest])
        {
            (order[largest], order[^1]) = (order[^1], order[largest]);
            var retried = SolveFast(problem, order, instructions, mustProve: true);
            fast = retried?.ProvedBound < fast.ProvedBound ? retried : fast;
        }

        if (fast?.ProvedBound <= DoubledElimination.GoodEnough)
        {
            return fast;
        }

        return mustProve && problem.StateCount <= mostDoubled ? SolveDoubled(problem) : fast ?? SolveWide(problem);
    }

    /// <summary>Elimination in doubles, refined where a proof is asked for; null where a product could leave their range.</summary>
    /// <param name="problem">The class.</param>
    /// <param name="order">The states of the class by their positions in the chain, in the order of elimination; the last is kept.</param>
    /// <param name="instructions">The vectors to compute with.</param>
    /// <param name="mustProve">Whether to refine.</param>
    private static StationaryVector? SolveFast(StationaryProblem problem, int[] order, InstructionSet instructions, bool mustProve)
    {
        using var reduced = ReducedClass.TryReduce(problem, order, instructions);
        var shares = new double[order.Length];
        if (reduced?.TryFindShares(shares) is not true)
        {
            return null;
        }

        var values = new double[problem.Matrix.Size];
        for (var k = 0; k < shares.Length; k++)
        {
            values[order[k]] = shares[k];
        }

        var bound = ReductionBound.OfStationary(shares.Length);
        var refined = mustProve ? reduced.Refine(problem, values, RefinementReach.LastDigits) : double.PositiveInfinity;
        return new StationaryVector(problem.Select(values))
        {
            HasConverged = true,
            Reason = refined < bound
                ? "Direct and free of subtraction, then refined in twice the precision."
                : "Direct and free of subtraction: every share keeps its digits.",
            ProvedBasis = refined < bound ? ErrorBasis.RefinedMonotone : ErrorBasis.SubtractionFree,
            ProvedBound = Math.Min(refined, bound),
        };
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
        var reduction = problem.Rates.ReduceDoubled(size - 1, problem.Options);
        var weights = new ScaledDoubleDouble[size];
        weights[^1] = ScaledDoubleDouble.One;
        reduction.ExtendLeft(weights);
        var total = weights.Aggregate((sum, weight) => sum + weight);
        return new StationaryVector(Array.ConvertAll(weights, weight => (weight / total).ToDouble()))
        {
            HasConverged = true,
            Reason = "Direct and free of subtraction, repeated in twice the precision and rounded once.",
            ProvedBasis = ErrorBasis.DoubledElimination,
            ProvedBound = DoubledElimination.RelativeErrorBound(size - 1, size, merges: 0),
        };
    }
}
