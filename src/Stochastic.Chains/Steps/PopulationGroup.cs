namespace Stochastic.Chains.Steps;

/// <summary>Items that are in a state at a step with the same probability, known to within a relative error.</summary>
internal readonly record struct PopulationGroup(long Count, double Probability, double RelativeErrorBound);
