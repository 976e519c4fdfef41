using Stochastic.Chains.Kernels;

namespace Stochastic.Chains.Stationary;

/// <summary>A recurrent class of which all states but the last of an order were eliminated in doubles: the factors, in pooled memory.</summary>
internal sealed class ReducedClass : IDisposable
{
    private readonly WorkTable _table;
    private readonly double[] _sums;
    private readonly int[] _order;

    private ReducedClass(WorkTable table, double[] sums, int[] order)
    {
        _table = table;
        _sums = sums;
        _order = order;
    }

    /// <summary>The factors of the system without the last state.</summary>
    internal TableFactors Factors => new(_table.View, _sums);

    /// <summary>Eliminates; null where a product could leave the range of a double.</summary>
    /// <param name="problem">The class.</param>
    /// <param name="order">The states of the class by their positions in the chain, in the order of elimination; the last is kept.</param>
    /// <param name="instructions">The vectors to compute with.</param>
    internal static ReducedClass? TryReduce(StationaryProblem problem, int[] order, InstructionSet instructions)
    {
        var size = order.Length;
        var options = problem.Options;
        var sums = new double[size - 1];
        WorkTable? table = WorkTable.Rent(size, size);
        try
        {
            RateTable.Among(problem.Matrix, order).CopyTo(table.View);
            if (!StateReduction.Eliminate(table.View, size, size, size - 1, sums, options.Parallelism, instructions, options.CancellationToken))
            {
                return null;
            }

            var reduced = new ReducedClass(table, sums, order);
            table = null;
            return reduced;
        }
        finally
        {
            table?.Dispose();
        }
    }

    /// <summary>Writes the shares in the order of elimination; false where one leaves the range of a double.</summary>
    internal bool TryFindShares(Span<double> shares) => ReductionSolve.Stationary(_table.View, _order.Length, shares);

    /// <summary>
    /// Refines shares, given by state of the chain, in place and returns a bound on the relative error of each; +∞ when they were left as
    /// they are because refinement does not contract.
    /// </summary>
    internal double Refine(StationaryProblem problem, double[] values, RefinementReach reach)
    {
        var solveError = ReductionBound.OfSystem(_order.Length - 1, _order.Length, merges: 0);
        return solveError < 1
            ? problem.Matrix.OnRates<double, Refining>(new Refining(_order, values, Factors, solveError, reach, problem.Options.CancellationToken))
            : double.PositiveInfinity;
    }

    /// <summary>Gives the memory back.</summary>
    public void Dispose() => _table.Dispose();

    private readonly struct Refining(
        int[] order, double[] values, TableFactors factors, double solveError, RefinementReach reach, CancellationToken cancellation) : IRateAlgorithm<double>
    {
        public double Run<TRows>(TRows rows)
            where TRows : struct, IRateRows => RefinedStationary.Refine(rows, order, values.AsSpan(), factors, solveError, reach, cancellation);
    }
}
