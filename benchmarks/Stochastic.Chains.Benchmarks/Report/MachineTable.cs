using System.Globalization;
using Stochastic.Chains.Benchmarks.Measuring;

namespace Stochastic.Chains.Benchmarks.Report;

/// <summary>What was measured on, at the head of each page.</summary>
internal static class MachineTable
{
    internal static string Of(Machine machine) => MarkdownTable.Of(
        ["Measured on", machine.Date],
        [
            ["processor", $"{machine.Processor}, {machine.Cores.ToString(CultureInfo.InvariantCulture)} cores, {machine.Instructions}"],
            ["system", machine.System],
            ["runtime", $"{machine.Runtime}; MathNet.Numerics {machine.MathNet}, its managed provider"],
            ["rivals", machine.Python],
            ["load, averages over 1 and 5 minutes", $"{machine.LoadBefore} at the start, {machine.LoadAfter} at the end"],
        ]);
}
