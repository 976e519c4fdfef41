using BenchmarkDotNet.Running;
using Stochastic.Chains.Benchmarks.Accuracy;
using Stochastic.Chains.Benchmarks.Growth;
using Stochastic.Chains.Benchmarks.Ratios;
using Stochastic.Chains.Benchmarks.Report;

namespace Stochastic.Chains.Benchmarks;

/// <summary>What the program does, by the first word after it.</summary>
internal static class Commands
{
    internal static IReadOnlyList<Command> All { get; } =
    [
        new("quick", "every question at its smaller sizes by BenchmarkDotNet, within six minutes", rest => Benchmarked(Depth.Quick, rest)),
        new("full", "everything by BenchmarkDotNet, within an hour", rest => Benchmarked(Depth.Full, rest)),
        new("ratios", "times beside those of MathNet.Numerics, numpy and scipy on the same inputs: results/ratios.json", _ => RatioRun.Write()),
        new("accuracy", "errors against exact arithmetic and what the certificates claimed: results/accuracy.json", _ => AccuracyRun.Write()),
        new("growth", "time and memory against size, with fitted slopes: results/growth.json", GrowthRun.Run),
        new("report", "tables and pictures from the results: results/*.md, *.csv, *.svg", _ => ReportRun.Write()),
        new("check", "what got slower than the committed ratios by more than a quarter; exit code 1 if anything did", _ => RatioCheck.Run()),
    ];

    /// <summary>Whatever is no command of ours is for BenchmarkDotNet; without any argument the commands are listed first.</summary>
    internal static int Unknown(string[] args)
    {
        if (args.Length == 0)
        {
            foreach (var command in All)
            {
                Console.WriteLine($"{command.Name,-9} {command.Purpose}");
            }

            Console.WriteLine("Other arguments go to BenchmarkDotNet, such as: --filter '*Stationary*' --job short");
            return 0;
        }

        BenchmarkSwitcher.FromAssembly(typeof(Commands).Assembly).Run(args);
        return 0;
    }

    private static int Benchmarked(Depth depth, string[] rest)
    {
        string[] args = rest.Any(argument => argument is "--filter" or "-f") ? rest : [.. rest, "--filter", "*"];
        var failed = BenchmarkSwitcher.FromAssembly(typeof(Commands).Assembly).Run(args, DepthConfig.For(depth))
            .Any(summary => summary.HasCriticalValidationErrors || summary.Reports.Any(report => !report.Success));
        return failed ? 1 : 0;
    }
}
