namespace Stochastic.Chains.Benchmarks;

/// <summary>A command of the program.</summary>
/// <param name="Name">The first word after the program.</param>
/// <param name="Purpose">What it does, in a line.</param>
/// <param name="Run">Runs it on the words that follow; returns the exit code.</param>
internal sealed record Command(string Name, string Purpose, Func<string[], int> Run);
