namespace Stochastic.Chains.Passage;

/// <summary>Probabilities of reaching one set of states before another. The structure decides first where they are 0 or 1.</summary>
internal static class RaceSolve<TState>
    where TState : notnull
{
    private const int Sides = 3;

    internal static FirstOfTwo<TState> Of(Chain<TState> chain, int[] firsts, int[] seconds, SolveOptions options)
    {
        // Side 0, 1 or 2: the first, the second or neither is certain; −1 where it is open.
        var sideOf = SidesOf(chain.Matrix, firsts, seconds);
        var probabilities = Enumerable.Range(0, Sides).Select(side => Array.ConvertAll(sideOf, own => own == side ? 1.0 : 0)).ToArray();
        var evidence = new SolveEvidence(options);
        int[] open = [.. Enumerable.Range(0, sideOf.Length).Where(state => sideOf[state] < 0)];
        if (open.Length > 0)
        {
            using var system = new ExitSystem<TState>(chain, open, Sides, sideOf, options);
            for (var side = 0; side < Sides; side++)
            {
                var solution = system.ExitProbabilities(side);
                for (var k = 0; k < open.Length; k++)
                {
                    probabilities[side][open[k]] = solution.Values[k];
                }

                var values = probabilities[side];
                evidence.Add(solution, () => system.Residual(0, values));
            }
        }

        TState[] Labels(int[] positions) => Array.ConvertAll(positions, position => chain.States[position]);
        return new(chain.States, Labels(firsts), Labels(seconds), probabilities[0], probabilities[1], probabilities[2], evidence.ToCertificate());
    }

    private static int[] SidesOf(TransitionMatrix matrix, int[] firsts, int[] seconds)
    {
        var first = TargetSplit.Before(matrix, firsts, seconds);
        var second = TargetSplit.Before(matrix, seconds, firsts);
        var sides = new int[matrix.Size];
        for (var state = 0; state < sides.Length; state++)
        {
            var (toFirst, toSecond) = (first.IsTarget[state] || first.IsCertain[state], second.IsTarget[state] || second.IsCertain[state]);
            var isOpen = first.IsPossible[state] || second.IsPossible[state];
            sides[state] = toFirst ? 0 : toSecond ? 1 : isOpen ? -1 : 2;
        }

        return sides;
    }
}
