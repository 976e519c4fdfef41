namespace Stochastic.Chains.Passage;

/// <summary>The solution of a system of first steps, with what is proved about each of its entries.</summary>
internal sealed record ExitSolution(double[] Values, ErrorBasis Basis, double RelativeErrorBound);
