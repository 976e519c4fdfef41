using Stochastic.Chains.Internal;

namespace Stochastic.Chains.Steps;

/// <summary>Takes a distribution through steps of one chain, or of a sequence of chains over the same states.</summary>
internal static class Propagation<TState>
    where TState : notnull
{
    private const int StepsBetweenReports = 1 << 10;

    /// <summary>Where things stand after a number of steps of one chain.</summary>
    internal static StepDistribution<TState> Run(ChainStart<TState> start, long steps, SolveOptions options)
    {
        var matrix = StepMatrix.Of(start.Chain);
        var report = options.Report("steps");
        var path = new StepPath<TState>(start.Distribution);
        while (path.Steps < steps)
        {
            options.CancellationToken.ThrowIfCancellationRequested();
            path.Advance(matrix, path.IsSettledUnder(matrix) ? steps - path.Steps : 1);
            if (path.Steps % StepsBetweenReports == 0)
            {
                report?.Invoke((double)path.Steps / steps);
            }
        }

        return path.ToDistribution(options);
    }

    /// <summary>Where things stand at every step from 0 on, one chain for each step; nothing is held.</summary>
    internal static IEnumerable<StepDistribution<TState>> Stream(Distribution<TState> start, IEnumerable<Chain<TState>> chains, SolveOptions options)
    {
        var path = new StepPath<TState>(start);
        yield return path.ToDistribution(options);
        foreach (var chain in Checked(start.States, chains))
        {
            options.CancellationToken.ThrowIfCancellationRequested();
            path.Advance(StepMatrix.Of(chain), 1);
            yield return path.ToDistribution(options);
        }
    }

    /// <summary>Where things stand after one step of each chain.</summary>
    internal static StepDistribution<TState> Through(Distribution<TState> start, IEnumerable<Chain<TState>> chains, SolveOptions options)
    {
        var path = new StepPath<TState>(start);
        foreach (var chain in Checked(start.States, chains))
        {
            options.CancellationToken.ThrowIfCancellationRequested();
            path.Advance(StepMatrix.Of(chain), 1);
        }

        return path.ToDistribution(options);
    }

    /// <summary>The same chain so many times.</summary>
    internal static IEnumerable<Chain<TState>> Repeat(Chain<TState> chain, long times)
    {
        for (var k = 0L; k < times; k++)
        {
            yield return chain;
        }
    }

    /// <summary>The chains of one period after the other, each checked to be over the same states.</summary>
    /// <exception cref="ArgumentException">A chain is missing or over other states.</exception>
    internal static IEnumerable<Chain<TState>> Checked(StateSpace<TState> states, IEnumerable<Chain<TState>> chains)
    {
        var period = 0;
        foreach (var chain in chains)
        {
            period++;
            if (chain is null)
            {
                throw new ArgumentException(Messages.NoChainForPeriod(period), nameof(chains));
            }

            yield return chain.States.Matches(states) ? chain : throw new ArgumentException(Difference(states, chain.States, period), nameof(chains));
        }
    }

    /// <summary>Says which state makes the difference: one that only one of the two knows, or the first out of order.</summary>
    private static string Difference(StateSpace<TState> expected, StateSpace<TState> found, int period)
    {
        foreach (var state in expected)
        {
            if (!found.Contains(state))
            {
                return Messages.StateMissingInPeriod(state, period);
            }
        }

        foreach (var state in found)
        {
            if (!expected.Contains(state))
            {
                return Messages.StateAddedInPeriod(state, period);
            }
        }

        var position = Enumerable.Range(0, expected.Count).First(k => !expected.Comparer.Equals(expected[k], found[k]));
        return Messages.StateOrderInPeriod(expected[position], found[position], position, period);
    }
}
