using Stochastic.Chains.Internal;
using Stochastic.Chains.Kernels;

namespace Stochastic.Chains.Steps;

/// <summary>Distributions after several times, from one run of the uniformized chain.</summary>
internal static class AfterTimeSolve<TState>
    where TState : notnull
{
    /// <summary>The most steps that are made.</summary>
    internal const double MostJumps = 1 << 30;

    private const int StepsBetweenReports = 1 << 10;

    internal static IReadOnlyList<TimeDistribution<TState>> Run(ChainStart<TState> start, IReadOnlyList<double> times, SolveOptions options, string parameter)
    {
        var chain = start.Chain;
        var rate = chain.UniformizationRate ?? throw new InvalidOperationException(Messages.NoRates);
        var sums = times.Select(time => new AfterTimeSum(time, Jumps(time, rate, parameter), chain.StateCount)).ToArray();
        var matrix = StepMatrix.Of(chain);
        var path = new StepPath<TState>(start.Distribution);
        var reachable = CountReachable(chain, start.Distribution);
        Propagate(path, matrix, sums, reachable, options);
        return Array.ConvertAll(sums, sum => sum.ToDistribution(chain.States, path, matrix, reachable, options));
    }

    private static double Jumps(double time, double rate, string parameter)
    {
        if (!double.IsFinite(time) || time < 0)
        {
            throw new ArgumentOutOfRangeException(parameter, time, Messages.TimeNotValid(time));
        }

        var jumps = time * rate; // exact: the rate is a power of two
        return jumps <= MostJumps ? jumps : throw new ArgumentOutOfRangeException(parameter, time, Messages.TimeTooLong(time, rate, jumps, MostJumps));
    }

    private static void Propagate(StepPath<TState> path, StepMatrix matrix, AfterTimeSum[] sums, int reachable, SolveOptions options)
    {
        var report = options.Report("steps");
        var most = sums.Length == 0 ? 0 : sums.Max(sum => sum.Last);
        while (true)
        {
            options.CancellationToken.ThrowIfCancellationRequested();
            var isComplete = true;
            foreach (var sum in sums)
            {
                sum.Add(path.Steps, path.Current, path.IsSettledUnder(matrix), reachable);
                isComplete &= sum.IsComplete;
            }

            if (isComplete)
            {
                return;
            }

            path.Advance(matrix, 1);
            if (path.Steps % StepsBetweenReports == 0)
            {
                report?.Invoke(Math.Min(1, path.Steps / (most + 1.0)));
            }
        }
    }

    private static int CountReachable(Chain<TState> chain, Distribution<TState> start)
    {
        var sources = new List<int>();
        for (var state = 0; state < start.Count; state++)
        {
            if (start.Values[state] > 0)
            {
                sources.Add(state);
            }
        }

        return chain.Matrix.OnGraph<bool[], Reachability>(new Reachability(sources)).Count(isReached => isReached);
    }
}
