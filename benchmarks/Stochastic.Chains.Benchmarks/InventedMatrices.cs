using Stochastic.Chains.Tests.Support;

namespace Stochastic.Chains.Benchmarks;

/// <summary>Invented inputs, the same in every run.</summary>
internal static class InventedMatrices
{
    private const int Seed = 20_250_106;
    private const int Groups = 3;

    /// <summary>A full matrix of random probabilities, row = from.</summary>
    internal static double[,] Dense(int states)
    {
        var random = new Random(Seed);
        var matrix = new double[states, states];
        for (var from = 0; from < states; from++)
        {
            var sum = 0.0;
            for (var to = 0; to < states; to++)
            {
                matrix[from, to] = random.NextDouble() + 1e-3;
                sum += matrix[from, to];
            }

            for (var to = 0; to < states; to++)
            {
                matrix[from, to] /= sum;
            }
        }

        return matrix;
    }

    /// <summary>The same with the last states made absorbing.</summary>
    internal static double[,] WithEnds(int states, int ends)
    {
        var matrix = Dense(states);
        for (var from = states - ends; from < states; from++)
        {
            for (var to = 0; to < states; to++)
            {
                matrix[from, to] = from == to ? 1 : 0;
            }
        }

        return matrix;
    }

    /// <summary>Three full groups; each state of a group also moves to those of the next with about the probability of the coupling.</summary>
    internal static double[,] Grouped(int states, double coupling, ulong seed)
    {
        var random = new SplitMix64(seed);
        var weights = new double[states, states];
        for (var from = 0; from < states; from++)
        {
            for (var to = 0; to < states; to++)
            {
                var groupsApart = (to - from + (Groups * states)) % Groups;
                weights[from, to] = groupsApart == 0 ? random.NextFactor() : groupsApart == 1 ? coupling * random.NextFactor() : 0;
            }
        }

        return RowWeights.Normalized(weights);
    }

    /// <summary>Ten moves of equal probability out of each state: to the next one, and far away in steps that never meet.</summary>
    internal static Transition<int>[] TenEach(int states)
    {
        const int moves = 10;
        var transitions = new Transition<int>[states * moves];
        for (var k = 0; k < transitions.Length; k++)
        {
            var (from, move) = Math.DivRem(k, moves);
            transitions[k] = new Transition<int>(from, (int)((from + 1 + ((long)move * (states / moves))) % states), 1.0 / moves);
        }

        return transitions;
    }
}
