namespace Stochastic.Chains.Passage;

/// <summary>Mean numbers of visits between some states, row-major: row = from, with what is proved about each.</summary>
internal sealed record VisitTable(int Count, double[] Values, ErrorBasis Basis, double RelativeErrorBound);
