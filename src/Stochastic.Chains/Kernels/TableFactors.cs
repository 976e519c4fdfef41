namespace Stochastic.Chains.Kernels;

/// <summary>The factors that <see cref="StateReduction"/> leaves in a table, as the proofs use them.</summary>
internal readonly struct TableFactors(MatrixView table, double[] sums) : IFactors
{
    public bool SolveLeft(Span<double> values) => ReductionSolve.SolveLeft(table, sums, sums.Length, values);

    public bool SolveRight(Span<double> values) => ReductionSolve.SolveRight(table, sums, sums.Length, values);
}
