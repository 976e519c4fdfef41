namespace Stochastic.Chains.Benchmarks.Ratios;

/// <summary>A question and an input. The input is made when its turn comes and let go of after it.</summary>
/// <param name="Question">What is asked.</param>
/// <param name="Input">Of what.</param>
/// <param name="Prepare">Makes the input and those who work on it.</param>
internal sealed record Comparison(string Question, string Input, Func<Contest> Prepare);
