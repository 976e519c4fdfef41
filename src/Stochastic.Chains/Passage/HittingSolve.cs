namespace Stochastic.Chains.Passage;

/// <summary>Mean times and probabilities of reaching a set of states. The structure decides first where they are 0, 1 or infinite.</summary>
internal static class HittingSolve<TState>
    where TState : notnull
{
    internal static HittingTimes<TState> Of(Chain<TState> chain, int[] targets, SolveOptions options)
    {
        var split = TargetSplit.Of(chain, targets);
        var means = new double[chain.StateCount];
        var reaching = new double[chain.StateCount];
        for (var state = 0; state < means.Length; state++)
        {
            var isCertain = split.IsTarget[state] || split.IsCertain[state];
            means[state] = isCertain ? 0 : double.PositiveInfinity;
            reaching[state] = isCertain ? 1 : 0;
        }

        var evidence = new SolveEvidence(options);
        int[] certain = [.. Positions(split.IsCertain)];
        if (certain.Length > 0)
        {
            using var system = new ExitSystem<TState>(chain, certain, exits: 1, Array.ConvertAll(split.IsTarget, isTarget => isTarget ? 0 : -1), options);
            var solution = system.MeanTimes();
            Scatter(solution.Values, certain, means);
            evidence.Add(solution, () => system.Residual(1 / (chain.UniformizationRate ?? 1), means));
        }

        int[] possible = [.. Positions(split.IsPossible)];
        if (possible.Length > 0)
        {
            using var system = new ExitSystem<TState>(chain, possible, exits: 2, Array.ConvertAll(reaching, certainly => certainly == 1 ? 0 : 1), options);
            var solution = system.ExitProbabilities(0);
            Scatter(solution.Values, possible, reaching);
            evidence.Add(solution, () => system.Residual(0, reaching));
        }

        var question = new HittingQuestion<TState>(chain, targets, split, options);
        return new HittingTimes<TState>(question, chain.States, Array.ConvertAll(targets, target => chain.States[target]), means, reaching, evidence.ToCertificate());
    }

    private static IEnumerable<int> Positions(bool[] flags) => Enumerable.Range(0, flags.Length).Where(position => flags[position]);

    private static void Scatter(double[] solution, int[] members, double[] values)
    {
        for (var k = 0; k < members.Length; k++)
        {
            values[members[k]] = solution[k];
        }
    }
}
