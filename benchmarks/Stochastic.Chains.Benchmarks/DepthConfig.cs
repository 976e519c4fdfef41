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

    /// <summary>Watch one call from start to end instead of repeating it, which takes as long as it takes.</summary>
    private static readonly string[] NotQuick = ["CancellationBenchmarks", "LargeStationaryBenchmarks", "ManyPowersBenchmarks"];

    internal static IConfig For(Depth depth)
    {
        var job = Job.Default
            .WithToolchain(InProcessEmitToolchain.Instance)
            .WithIterationTime(TimeInterval.FromMilliseconds(depth == Depth.Quick ? QuickMilliseconds : FullMilliseconds))
            .WithWarmupCount(depth == Depth.Quick ? 2 : 4)
            .WithIterationCount(depth == Depth.Quick ? 4 : 8);
        var config = ManualConfig.CreateEmpty()
            .AddJob(job)
            .AddColumnProvider(DefaultColumnProviders.Instance)
            .AddExporter(MarkdownExporter.GitHub)
            .AddLogger(ConsoleLogger.Default)
            .WithOptions(ConfigOptions.JoinSummary);
        return depth == Depth.Quick ? config.AddFilter(new SimpleFilter(IsQuick)) : config;
    }

    private static bool IsQuick(BenchmarkCase benchmark) =>
        !NotQuick.Contains(benchmark.Descriptor.Type.Name)
        && benchmark.Parameters.Items.All(parameter => parameter.Value is not int number
            || number <= (parameter.Name == "States" ? MostQuickStates : MostQuickItems));
}
