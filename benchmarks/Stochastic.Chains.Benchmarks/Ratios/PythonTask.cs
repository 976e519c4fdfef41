namespace Stochastic.Chains.Benchmarks.Ratios;

/// <summary>An operation of the script beside the rivals, and its inputs: arrays of doubles or integers, in the order the script takes them.</summary>
/// <param name="Operation">The name of the operation.</param>
/// <param name="Inputs">The inputs.</param>
internal sealed record PythonTask(string Operation, IReadOnlyList<Array> Inputs);
