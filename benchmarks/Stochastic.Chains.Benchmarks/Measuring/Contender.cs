namespace Stochastic.Chains.Benchmarks.Measuring;

/// <summary>One of those that are timed in turn.</summary>
/// <param name="Name">What the tables call it.</param>
/// <param name="Least">The least seconds of so many runs, one directly after the other.</param>
internal sealed record Contender(string Name, Func<int, double> Least);
