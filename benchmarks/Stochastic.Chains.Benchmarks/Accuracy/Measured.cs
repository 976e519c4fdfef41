namespace Stochastic.Chains.Benchmarks.Accuracy;

/// <summary>How far a method was off on the chains of one family, and how far off it said that it could be: the worst of several chains.</summary>
/// <param name="Question">What was asked.</param>
/// <param name="Family">The family of chains.</param>
/// <param name="Coupling">The size of the moves between the groups of a nearly decomposable family; not a number for other families.</param>
/// <param name="Method">The method.</param>
/// <param name="Chains">How many chains there were.</param>
/// <param name="Answered">How many of them it answered; it refused the others, or did not converge.</param>
/// <param name="Error">The largest relative error of an entry, against exact arithmetic; infinite where nothing was answered.</param>
/// <param name="Bound">The largest bound that a certificate claimed; infinite where there was none.</param>
/// <param name="BoundKind">What the bound is on.</param>
/// <param name="Violations">How many answers were further off than their bound.</param>
internal sealed record Measured(
    string Question, string Family, double Coupling, string Method, int Chains, int Answered, double Error, double Bound, BoundKind BoundKind, int Violations);
