namespace Stochastic.Chains.Tests.Support;

/// <summary>Irreducible chains without small probabilities.</summary>
internal static class RandomFamilies
{
    public static double[,] Dense(int size, SplitMix64 random)
    {
        var weights = new double[size, size];
        for (var i = 0; i < size; i++)
        {
            for (var j = 0; j < size; j++)
            {
                weights[i, j] = random.NextFactor();
            }
        }

        return RowWeights.Normalized(weights);
    }

    /// <summary>One cycle through all states, about two more moves from each, and a self-loop in every third state.</summary>
    public static double[,] Sparse(int size, SplitMix64 random)
    {
        var weights = new double[size, size];
        for (var i = 0; i < size; i++)
        {
            weights[i, (i + 1) % size] = random.NextFactor();
            for (var extra = random.Next(0, 4); extra > 0; extra--)
            {
                var to = random.Next(0, size - 1);
                if (to != i)
                {
                    weights[i, to] = random.NextFactor();
                }
            }

            weights[i, i] = random.NextChance(oneIn: 3) ? random.NextFactor() : 0;
        }

        return RowWeights.Normalized(weights);
    }

    /// <summary>Two to five blocks, each moving to every state of the next one only: the period is the number of blocks.</summary>
    public static double[,] Periodic(int size, SplitMix64 random)
    {
        var period = random.Next(2, Math.Min(5, size));
        var weights = new double[size, size];
        for (var i = 0; i < size; i++)
        {
            for (var j = 0; j < size; j++)
            {
                weights[i, j] = j % period == (i + 1) % period ? random.NextFactor() : 0;
            }
        }

        return RowWeights.Normalized(weights);
    }
}
