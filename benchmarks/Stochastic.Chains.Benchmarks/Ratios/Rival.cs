namespace Stochastic.Chains.Benchmarks.Ratios;

/// <summary>An operation of a general-purpose library.</summary>
/// <param name="Name">What the tables call it.</param>
/// <param name="Run">Does it in this process and returns one figure of the answer; null where Python does it.</param>
/// <param name="Task">What Python does; null where this process does it.</param>
/// <param name="Target">The largest ratio that is aimed at; not a number where none is set.</param>
internal sealed record Rival(string Name, Func<double>? Run, PythonTask? Task, double Target)
{
    internal static Rival Here(string name, Func<double> run, double target = double.NaN) => new(name, run, null, target);

    internal static Rival InPython(string name, string operation, IReadOnlyList<Array> inputs, double target = double.NaN) =>
        new(name, null, new PythonTask(operation, inputs), target);
}
