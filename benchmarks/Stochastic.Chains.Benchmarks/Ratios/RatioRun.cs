using System.Globalization;
using MathNet.Numerics;
using Stochastic.Chains.Benchmarks.Measuring;

namespace Stochastic.Chains.Benchmarks.Ratios;

/// <summary>Measures every comparison, all contenders in turn.</summary>
internal static class RatioRun
{
    internal const string FileName = "ratios.json";

    private const double SecondsEach = 1.5;
    private const double Agreement = 1e-6;

    internal static int Write()
    {
        using var python = PythonProcess.TryStart();
        var machine = Machine.Now(python?.Versions ?? "absent");
        List<Ratio> rows = [];
        foreach (var comparison in Comparisons.All)
        {
            rows.AddRange(Measure(comparison, python, SecondsEach));
        }

        new ResultFile<Ratio>(machine.Finished(), rows).Write(FileName);
        return 0;
    }

    /// <summary>One row for each rival, those in Python only where there is one.</summary>
    /// <exception cref="InvalidOperationException">Two answers differ.</exception>
    internal static List<Ratio> Measure(Comparison comparison, PythonProcess? python, double secondsEach)
    {
        Control.UseSingleThread();
        GC.Collect();
        var (ours, proved, all) = comparison.Prepare();
        List<Rival> rivals = [.. all.Where(rival => rival.Run is not null || python is not null)];
        var figure = FigureOrNone(ours);
        List<Contender> contenders = [.. rivals.Select(rival => For(rival, python, figure, comparison))];
        if (!double.IsNaN(figure))
        {
            contenders.AddRange(proved is null ? [Here("library", ours)] : [Here("library", ours), Here("library, proved", proved)]);
        }

        var seconds = AlternatingTimer.Least(contenders, secondsEach);
        var library = double.IsNaN(figure) ? double.PositiveInfinity : seconds[rivals.Count] * 1e3;
        var withProof = double.IsNaN(figure) || proved is null ? double.NaN : seconds[^1] * 1e3;
        List<Ratio> rows =
        [
            .. rivals.Select((rival, k) => new Ratio(
                comparison.Question, comparison.Input, rival.Name, library, withProof, seconds[k] * 1e3, rival.Target)),
        ];
        foreach (var row in rows)
        {
            Console.WriteLine(string.Create(
                CultureInfo.InvariantCulture, $"{row.Question}, {row.Input}: {row.Milliseconds:G4} ms, {row.Rival} {row.RivalMilliseconds:G4} ms, ratio {row.Value:G3}"));
        }

        return rows;
    }

    /// <summary>Not a number where the library converges to no answer, which is a miss and stays visible as one.</summary>
    private static double FigureOrNone(Func<double> ours)
    {
        try
        {
            return ours();
        }
        catch (ConvergenceException refusal)
        {
            Console.WriteLine(refusal.Message);
            return double.NaN;
        }
    }

    private static Contender Here(string name, Func<double> run) => new(name, runs => AlternatingTimer.LeastOf(runs, () => run()));

    private static Contender For(Rival rival, PythonProcess? python, double figure, Comparison comparison)
    {
        if (rival.Run is { } run)
        {
            RequireAgreement(rival, run(), figure, comparison);
            return Here(rival.Name, run);
        }

        python!.Prepare(rival.Task!);
        RequireAgreement(rival, python.Run(1).Figure, figure, comparison);
        return new Contender(rival.Name, runs => python.Run(runs).Seconds);
    }

    private static void RequireAgreement(Rival rival, double theirs, double ours, Comparison comparison)
    {
        if (!double.IsNaN(ours) && !(Math.Abs((theirs / ours) - 1) <= Agreement))
        {
            throw new InvalidOperationException(string.Create(
                CultureInfo.InvariantCulture,
                $"{comparison.Question}, {comparison.Input}: {rival.Name} says {theirs:G17}, the library {ours:G17}, so their times mean nothing."));
        }
    }
}
