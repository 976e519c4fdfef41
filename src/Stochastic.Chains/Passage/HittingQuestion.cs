using Stochastic.Chains.Internal;
using Stochastic.Chains.Kernels;

namespace Stochastic.Chains.Passage;

/// <summary>What was asked of a chain, kept with the answer so that more can be asked about the same targets.</summary>
internal sealed class HittingQuestion<TState>
    where TState : notnull
{
    private readonly Chain<TState> _chain;
    private readonly int[] _targets;
    private readonly TargetSplit _split;

    internal HittingQuestion(Chain<TState> chain, int[] targets, TargetSplit split, SolveOptions options)
    {
        _chain = chain;
        _targets = targets;
        _split = split;
        Options = options with { CancellationToken = CancellationToken.None, Progress = null };
    }

    /// <summary>How the first question was to be computed, without its token and its listener.</summary>
    internal SolveOptions Options { get; }

    internal PassageMoments<TState> Moments(double[] means, Certificate evidence, SolveOptions options) =>
        MomentSolve<TState>.Of(_chain, Positions(_split.IsCertain), _split.IsTarget, means, evidence, options);

    internal ConditionalTimes<TState> IfReached(double[] reaching, Certificate evidence, SolveOptions options)
    {
        var means = Array.ConvertAll(reaching, probability => probability > 0 ? 0 : double.PositiveInfinity);
        var members = OnTheWay();
        var totals = new SolveEvidence(options);
        if (members.Length > 0)
        {
            ConditionalMeans<TState>.Fill(_chain, members, ExitOf(), reaching, means, evidence, totals, options);
        }

        return new ConditionalTimes<TState>(_chain.States, means, totals.ToCertificate());
    }

    internal ExpectedVisits<TState> VisitsFrom(TState from, SolveOptions options)
    {
        var start = _chain.States.Require(from);
        var visits = new double[_chain.StateCount];
        var members = OnTheWay();
        var position = Array.IndexOf(members, start);
        var evidence = new SolveEvidence(options);
        if (position >= 0)
        {
            using var system = Reduce(members, options);
            var given = new ScaledDoubleDouble[members.Length];
            given[position] = (ScaledDoubleDouble)1 / (_chain.UniformizationRate ?? 1);
            var solution = system.SolveLeft(given).ToDoubles(_chain.States, members, Messages.VisitsOutOfRange);
            for (var k = 0; k < members.Length; k++)
            {
                visits[members[k]] = solution.Values[k];
            }

            evidence.Add(solution, () => system.LeftResidual(given, solution.Values));
        }

        return new ExpectedVisits<TState>(from, _chain.States, visits, evidence.ToCertificate());
    }

    internal PassageTimeDistribution<TState> Distribution(TState from, int maxSteps, SolveOptions options)
    {
        RequireSteps();
        return PassageTimes<TState>.Distribution(_chain, Survivors(from), from, maxSteps, options);
    }

    internal double Quantile(TState from, double probability, double reaching, SolveOptions options)
    {
        RequireSteps();
        if (probability > reaching)
        {
            return double.PositiveInfinity;
        }

        var members = OnTheWay();
        var start = Array.IndexOf(members, _chain.States.Require(from));
        return PassageTimes<TState>.Quantile(
            () => Powers(members, options), Survivors(from), probability, start, members.Length, _chain.TransitionCount, options);
    }

    private static int[] Positions(bool[] flags) => [.. Enumerable.Range(0, flags.Length).Where(position => flags[position])];

    private int[] OnTheWay() => [.. Enumerable.Range(0, _chain.StateCount).Where(state => _split.IsCertain[state] || _split.IsPossible[state])];

    /// <summary>Two exits: the target, and where it is out of reach.</summary>
    private ExitSystem<TState> Reduce(int[] members, SolveOptions options) =>
        new(_chain, members, exits: 2, ExitOf(), options);

    private int[] ExitOf() => Array.ConvertAll(_split.IsTarget, isTarget => isTarget ? 0 : 1);

    private SurvivorSteps Survivors(TState from)
    {
        int[] lost = [.. Enumerable.Range(0, _chain.StateCount).Where(state => !_split.IsTarget[state] && !_split.IsCertain[state] && !_split.IsPossible[state])];
        return new SurvivorSteps(StepMatrix.Of(_chain), _targets, lost, _chain.States.Require(from));
    }

    private StoppedPowers Powers(int[] members, SolveOptions options)
    {
        var bytes = sizeof(double) * (long)members.Length * WorkTable.PreferredStride(StoppedPowers.Columns(members.Length));
        options.RequireMemory(members.Length, bytes);
        var rates = RateTable.WithExits(_chain.Matrix, members, 2, state => _split.IsTarget[state] ? 0 : 1);
        var steps = StepMatrix.Of(_chain);
        var table = WorkTable.Rent(members.Length, StoppedPowers.Columns(members.Length));
        rates.CopyTo(table.View);
        for (var k = 0; k < members.Length; k++)
        {
            table.View.Row(k, k, 1)[0] = steps.Stay(members[k]);
        }

        return new StoppedPowers(
            table, members.Length, new WorkSharing(options.Parallelism, options.CancellationToken), count => options.RequireMemory(members.Length, count * bytes));
    }

    private void RequireSteps()
    {
        if (_chain.UniformizationRate is { } rate)
        {
            throw new InvalidOperationException(Messages.TimedChainHasNoSteps(rate));
        }
    }
}
