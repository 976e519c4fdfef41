using Stochastic.Chains.Kernels;

namespace Stochastic.Chains.Stationary;

/// <summary>
/// Bounds on the sum of all errors of a stationary vector, and so on the absolute error of each share: what is left unbalanced, times how
/// many times as large an error can be.
/// </summary>
internal static class SumOfErrors
{
    /// <summary>The best such bound that is below the given one, which is returned with its own basis otherwise.</summary>
    internal static (ErrorBasis Basis, double Absolute) Improve(StationaryProblem problem, double[] shares, ErrorBasis basis, double absolute) =>
        problem.Matrix.OnRates<(ErrorBasis, double), Search>(new Search(problem, shares, basis, absolute));

    /// <summary>
    /// An error is known only to within a multiple, of one or more, of the residual that it leaves, so nothing is tried where the residual
    /// alone is above the bound that is there. Times to a reference state take an elimination, which is made for small classes only.
    /// </summary>
    private readonly struct Search(StationaryProblem problem, double[] shares, ErrorBasis basis, double absolute) : IRateAlgorithm<(ErrorBasis, double)>
    {
        public (ErrorBasis, double) Run<TRows>(TRows rows)
            where TRows : struct, IRateRows
        {
            var residual = VectorResidual.Of(rows, problem.Members, problem.Spread(shares));
            var best = (Basis: basis, Absolute: absolute);
            if (!(residual.ErrorBound(1) < best.Absolute))
            {
                return best;
            }

            var contracted = residual.ErrorBound(Contraction.Amplification(rows, problem.Members));
            best = contracted < best.Absolute ? (ErrorBasis.Contraction, contracted) : best;
            if (problem.StateCount > DoubledElimination.MostStates)
            {
                return best;
            }

            var timed = residual.ErrorBound(LongestTime(rows));
            return timed < best.Absolute ? (ErrorBasis.MonotoneResidual, timed) : best;
        }

        /// <summary>An upper bound of the longest mean time to the state with the largest share.</summary>
        private double LongestTime<TRows>(TRows rows)
            where TRows : struct, IRateRows
        {
            var order = problem.Members.ToArray();
            var (reference, others) = (VectorLoops.IndexOfLargest(shares), order.Length - 1);
            (order[reference], order[^1]) = (order[^1], order[reference]);
            var means = new double[others];
            means.AsSpan().Fill(1);
            using var reduced = ReducedClass.TryReduce(problem, order, InstructionSet.Widest);
            if (reduced?.Factors.SolveRight(means) is not true)
            {
                return double.PositiveInfinity;
            }

            var times = new double[problem.Matrix.Size];
            for (var k = 0; k < means.Length; k++)
            {
                times[order[k]] = means[k];
            }

            return MonotoneResidual.Amplification(rows, problem.Members, order[^1], times);
        }
    }
}
