using System.Diagnostics;
using System.Globalization;
using Stochastic.Chains.Benchmarks.Measuring;

namespace Stochastic.Chains.Benchmarks.Growth;

/// <summary>Measures time and memory at growing sizes.</summary>
internal static class GrowthRun
{
    internal const string FileName = "growth.json";

    private const double SecondsEach = 0.6;

    /// <summary>Without words: everything. With the number of a curve and a size: prints what the first call allocates.</summary>
    internal static int Run(string[] words)
    {
        if (words is [var curve, var size])
        {
            var call = GrowthCurve.All[int.Parse(curve, CultureInfo.InvariantCulture)].Prepare(int.Parse(size, CultureInfo.InvariantCulture));
            Console.WriteLine(Allocated(call));
            return 0;
        }

        var machine = Machine.Now("not used");
        List<GrowthRow> rows = [.. GrowthCurve.All.SelectMany((curve, number) => curve.Sizes.Select(size => Measure(curve, number, size)))];
        new ResultFile<GrowthRow>(machine.Finished(), rows).Write(FileName);
        return 0;
    }

    private static GrowthRow Measure(GrowthCurve curve, int number, int size)
    {
        var first = AllocatedInFreshProcess(number, size);
        var call = curve.Prepare(size);
        call();
        var seconds = AlternatingTimer.Least([new Contender(curve.Question, runs => AlternatingTimer.LeastOf(runs, call))], SecondsEach)[0];
        var later = Allocated(call);
        Console.WriteLine(string.Create(
            CultureInfo.InvariantCulture, $"{curve.Question}, {size} {curve.Measure}: {seconds * 1e3:G4} ms, {first} bytes at first, {later} later"));
        return new GrowthRow(curve.Question, curve.Measure, curve.Order, curve.MemoryOrder, size, seconds * 1e3, first, later);
    }

    /// <summary>Only a new process has empty pools.</summary>
    private static long AllocatedInFreshProcess(int curve, int size)
    {
        var start = new ProcessStartInfo(Environment.ProcessPath!) { RedirectStandardOutput = true };
        if (Path.GetFileNameWithoutExtension(Environment.ProcessPath) == "dotnet")
        {
            start.ArgumentList.Add(typeof(GrowthRun).Assembly.Location);
        }

        foreach (var word in new[] { "growth", curve.ToString(CultureInfo.InvariantCulture), size.ToString(CultureInfo.InvariantCulture) })
        {
            start.ArgumentList.Add(word);
        }

        using var process = Process.Start(start) ?? throw new InvalidOperationException("The process could not be started again.");
        var bytes = long.Parse(process.StandardOutput.ReadToEnd(), CultureInfo.InvariantCulture);
        process.WaitForExit();
        return bytes;
    }

    private static long Allocated(Action call)
    {
        var before = GC.GetTotalAllocatedBytes(precise: true);
        call();
        return GC.GetTotalAllocatedBytes(precise: true) - before;
    }
}
