namespace Stochastic.Chains.Benchmarks;

/// <summary>Invented inputs, the same in every run.</summary>
internal static class InventedMatrices
{
    private const int Seed = 20_250_106;

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
