namespace Stochastic.Chains.Kernels;

/// <summary>
/// Factors of the matrix A of a system of first steps over some states, in an order of their own: row sums of the rates, exits included,
/// on the diagonal and minus the rates off it. Its inverse is non-negative.
/// </summary>
internal interface IFactors
{
    /// <summary>Solves y · A = b in place; false when a number left the normal range of doubles.</summary>
    bool SolveLeft(Span<double> values);

    /// <summary>Solves A · h = c in place; false when a number left the normal range of doubles.</summary>
    bool SolveRight(Span<double> values);
}
