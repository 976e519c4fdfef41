using System.Globalization;
using Stochastic.Chains.Benchmarks.Measuring;

namespace Stochastic.Chains.Benchmarks.Ratios;

/// <summary>
/// Holds the ratios of now against the committed ones. Only ratios are compared, never times, so that another machine can be used; its kind
/// still matters, and a message says where it differs. What looks slower is measured again, longer, before it is named.
/// </summary>
internal static class RatioCheck
{
    private const double Allowed = 1.25;
    private const double SecondsEach = 0.3;
    private const double LongestMilliseconds = 500;

    private static readonly double[] Again = [1, 3];

    internal static int Run()
    {
        var committed = ResultFile<Ratio>.Read(RatioRun.FileName);
        using var python = PythonProcess.TryStart();
        var machine = Machine.Now(python?.Versions ?? "absent");
        if (machine.Instructions != committed.Machine.Instructions)
        {
            Console.WriteLine($"The committed ratios come from {committed.Machine.Instructions}, this is {machine.Instructions}: expect them to differ.");
        }

        List<string> slower = [];
        foreach (var comparison in Comparisons.All)
        {
            List<Ratio> before = [.. committed.Rows.Where(row => row.Question == comparison.Question && row.Input == comparison.Input)];
            if (before.Count == 0)
            {
                Console.WriteLine($"{comparison.Question}, {comparison.Input}: no committed ratio; run ratios and commit it.");
            }
            else if (before.All(row => Math.Max(row.Milliseconds, row.RivalMilliseconds) < LongestMilliseconds))
            {
                slower.AddRange(Slower(comparison, before, python));
            }
        }

        Console.WriteLine(slower.Count == 0 ? "Nothing got slower by more than a quarter." : $"Slower by more than a quarter:\n{string.Join('\n', slower)}");
        return slower.Count == 0 ? 0 : 1;
    }

    private static IEnumerable<string> Slower(Comparison comparison, List<Ratio> before, PythonProcess? python)
    {
        var now = RatioRun.Measure(comparison, python, SecondsEach);
        foreach (var seconds in Again)
        {
            if (now.Exists(row => IsSlower(row, before)))
            {
                List<Ratio> again = RatioRun.Measure(comparison, python, seconds);
                now = [.. now.Zip(again, (first, second) => first.Value < second.Value ? first : second)];
            }
        }

        return now.Where(row => IsSlower(row, before)).Select(row => string.Create(
            CultureInfo.InvariantCulture,
            $"  {row.Question}, {row.Input}, against {row.Rival}: ratio {row.Value:G3}, committed {before.Find(row.IsSameComparison)!.Value:G3}"));
    }

    private static bool IsSlower(Ratio row, List<Ratio> before) => before.Find(row.IsSameComparison) is { } committed && row.Value > Allowed * committed.Value;
}
