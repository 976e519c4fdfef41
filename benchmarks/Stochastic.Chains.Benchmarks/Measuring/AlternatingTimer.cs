using System.Diagnostics;

namespace Stochastic.Chains.Benchmarks.Measuring;

/// <summary>
/// Times contenders in turn, round after round, and keeps the least time of each: what else runs on the machine meets all of them alike, and the
/// least time is the one it disturbed least.
/// </summary>
internal static class AlternatingTimer
{
    private const double SecondsPerTurn = 0.02;
    private const double WarmUpSeconds = 0.25;
    private const int MostRunsPerTurn = 200;

    /// <summary>The least seconds of each contender.</summary>
    /// <param name="contenders">Those to be timed.</param>
    /// <param name="seconds">What each may take; one whose single run takes longer is not run again.</param>
    internal static double[] Least(IReadOnlyList<Contender> contenders, double seconds)
    {
        double[] least = [.. contenders.Select(contender => WarmUp(contender, seconds))];
        int[] runs = [.. least.Select(first => (int)Math.Clamp(SecondsPerTurn / first, 1, MostRunsPerTurn))];
        double[] spent = [.. least.Select(first => first < seconds ? 0 : seconds)];
        while (spent.Any(own => own < seconds))
        {
            for (var k = 0; k < contenders.Count; k++)
            {
                if (spent[k] < seconds)
                {
                    var began = Stopwatch.GetTimestamp();
                    least[k] = Math.Min(least[k], contenders[k].Least(runs[k]));
                    spent[k] += Stopwatch.GetElapsedTime(began).TotalSeconds;
                }
            }
        }

        return least;
    }

    /// <summary>The least seconds of so many runs of an action of this process.</summary>
    internal static double LeastOf(int runs, Action action)
    {
        var least = double.PositiveInfinity;
        for (var run = 0; run < runs; run++)
        {
            var began = Stopwatch.GetTimestamp();
            action();
            least = Math.Min(least, Stopwatch.GetElapsedTime(began).TotalSeconds);
        }

        return least;
    }

    /// <summary>Runs until the compiler has had its time and all buffers have been touched.</summary>
    private static double WarmUp(Contender contender, double seconds)
    {
        var began = Stopwatch.GetTimestamp();
        var least = contender.Least(1);
        while (Stopwatch.GetElapsedTime(began).TotalSeconds < Math.Min(WarmUpSeconds, seconds))
        {
            least = Math.Min(least, contender.Least(1));
        }

        return least;
    }
}
