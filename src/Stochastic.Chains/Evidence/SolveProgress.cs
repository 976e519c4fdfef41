namespace Stochastic.Chains;

/// <summary>How far a long computation has come.</summary>
/// <param name="Stage">What is being done, in a word or two.</param>
/// <param name="Fraction">The part of the stage that is done, from 0 to 1.</param>
public readonly record struct SolveProgress(string Stage, double Fraction);
