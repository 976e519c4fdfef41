using BenchmarkDotNet.Columns;
using BenchmarkDotNet.Configs;
using BenchmarkDotNet.Exporters;
using BenchmarkDotNet.Filters;
using BenchmarkDotNet.Jobs;
using BenchmarkDotNet.Loggers;
using BenchmarkDotNet.Running;
using BenchmarkDotNet.Toolchains.InProcess.Emit;
using Perfolizer.Horology;

namespace Stochastic.Chains.Benchmarks;

/// <summary>
/// One process for all, so that no time goes into builds. Each case sees its buffers pooled and touched by its warm-up, so that first-touch page
/// faults are not measured.
/// </summary>
internal static class DepthConfig
{
    private const int MostQuickStates = 1_000;
    private const int MostQuickItems = 100_000;
    private const int QuickMilliseconds = 50;
    private const int FullMilliseconds = 250;

    private const string States = "States";
    private const int MostStatesPropagated = 100;

    private static readonly string[] NotQuick = ["CancellationBenchmarks", "LargeStationaryBenchmarks", "ManyPowersBenchmarks"];

    internal static IConfig For(Depth depth)
    {
        var isQuick = depth == Depth.Quick;
        var job = Job.Default
            .WithToolchain(InProcessEmitToolchain.Instance)
            .WithIterationTime(TimeInterval.FromMilliseconds(isQuick ? QuickMilliseconds : FullMilliseconds))
            .WithWarmupCount(isQuick ? 2 : 4)
            .WithIterationCount(isQuick ? 4 : 8);
        return ManualConfig.CreateEmpty()
            .AddJob(job)
            .AddColumnProvider(DefaultColumnProviders.Instance)
            .AddExporter(MarkdownExporter.GitHub)
            .AddLogger(ConsoleLogger.Default)
            .AddFilter(new SimpleFilter(benchmark => IsBearable(benchmark) && (!isQuick || IsQuick(benchmark))));
    }

    /// <summary>A thousand steps of each of many rows take minutes a call; a few rows show how it grows.</summary>
    private static bool IsBearable(BenchmarkCase benchmark) =>
        benchmark.Descriptor.WorkloadMethod.Name != "Propagation" || Number(benchmark, States) <= MostStatesPropagated;

    private static bool IsQuick(BenchmarkCase benchmark) =>
        !NotQuick.Contains(benchmark.Descriptor.Type.Name)
        && Number(benchmark, States) <= MostQuickStates
        && Number(benchmark, "Transitions") <= MostQuickItems
        && Number(benchmark, "Events") <= MostQuickItems;

    /// <summary>A parameter; 0 where there is none of that name.</summary>
    private static int Number(BenchmarkCase benchmark, string name) =>
        benchmark.Parameters.Items.FirstOrDefault(parameter => parameter.Name == name)?.Value is int number ? number : 0;
}
