namespace Stochastic.Chains.Passage;

/// <summary>Absorption probabilities and mean steps of the transient states; the structure answers for the recurrent ones.</summary>
internal static class AbsorptionSolve<TState>
    where TState : notnull
{
    internal static Absorption<TState> Of(Chain<TState> chain, SolveOptions options)
    {
        var structure = chain.Structure();
        var ends = structure.RecurrentClasses;
        var endOf = new int[chain.StateCount];
        endOf.AsSpan().Fill(-1);
        var probabilities = new double[chain.StateCount * ends.Count];
        for (var end = 0; end < ends.Count; end++)
        {
            foreach (var member in ends[end].Members)
            {
                endOf[member] = end;
                probabilities[(member * ends.Count) + end] = 1;
            }
        }

        var meanSteps = new double[chain.StateCount];
        var evidence = new SolveEvidence(options);
        var transient = structure.TransientPositions;
        if (transient.Length > 0)
        {
            using var system = new ExitSystem<TState>(chain, transient, ends.Count, endOf, options);
            Fill(system, chain, transient, ends.Count, probabilities, meanSteps, evidence);
        }

        var certificate = evidence.ToCertificate();
        return new Absorption<TState>(chain, ends, endOf, probabilities, StepsUntilEnd(chain, endOf, meanSteps, certificate, options), certificate, options);
    }

    private static HittingTimes<TState> StepsUntilEnd(Chain<TState> chain, int[] endOf, double[] meanSteps, Certificate certificate, SolveOptions options)
    {
        int[] recurrent = [.. Enumerable.Range(0, endOf.Length).Where(state => endOf[state] >= 0)];
        var isEnd = Array.ConvertAll(endOf, end => end >= 0);
        var split = new TargetSplit(isEnd, Array.ConvertAll(isEnd, end => !end), new bool[isEnd.Length]);
        var certainly = new double[endOf.Length];
        certainly.AsSpan().Fill(1);
        return new HittingTimes<TState>(
            new HittingQuestion<TState>(chain, recurrent, split, options),
            chain.States,
            Array.ConvertAll(recurrent, state => chain.States[state]),
            meanSteps,
            certainly,
            certificate);
    }

    private static void Fill(
        ExitSystem<TState> system, Chain<TState> chain, int[] transient, int ends, double[] probabilities, double[] meanSteps, SolveEvidence evidence)
    {
        var together = system.TrySolveTogether();
        var means = together?[0] ?? system.MeanTimes();
        for (var k = 0; k < transient.Length; k++)
        {
            meanSteps[transient[k]] = means.Values[k];
        }

        evidence.Add(means, () => system.Residual(1 / (chain.UniformizationRate ?? 1), meanSteps));
        for (var end = 0; end < ends; end++)
        {
            var column = together?[end + 1] ?? system.ExitProbabilities(end);
            var position = end;
            for (var k = 0; k < transient.Length; k++)
            {
                probabilities[(transient[k] * ends) + end] = column.Values[k];
            }

            evidence.Add(column, () => system.Residual(0, [.. Enumerable.Range(0, chain.StateCount).Select(state => probabilities[(state * ends) + position])]));
        }
    }
}
