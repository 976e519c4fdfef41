namespace Stochastic.Chains.Tests.Support;

/// <summary>Chains with transient states.</summary>
internal static class ReducibleFamilies
{
    /// <summary>One to three recurrent classes and at least one transient state, no small probabilities.</summary>
    public static double[,] SeveralClasses(int size, SplitMix64 random) => WithExits(size, random, exit: 1);

    /// <summary>The same, but transient states leave for good with a probability between 1e-5 and 1e-250 per step only.</summary>
    public static double[,] RareAbsorption(int size, SplitMix64 random) =>
        WithExits(size, random, RowWeights.PowerOfTen(-random.Next(5, 250)));

    /// <summary>
    /// One way only, into the absorbing state 0; every state stays with a probability of its own between 1e-15 and 1 - 1e-15, and about
    /// every third does not stay at all.
    /// </summary>
    public static double[,] AbsorbingPath(int size, SplitMix64 random)
    {
        var matrix = new double[size, size];
        matrix[0, 0] = 1;
        for (var i = 1; i < size; i++)
        {
            var small = RowWeights.PowerOfTen(-random.Next(0, 14)) * random.NextFactor();
            var stay = random.Next(0, 2) switch { 0 => 0, 1 => small, _ => 1 - small };
            matrix[i, i] = stay;
            matrix[i, i - 1] = 1 - stay;
        }

        return matrix;
    }

    private static double[,] WithExits(int size, SplitMix64 random, double exit)
    {
        var classes = random.Next(1, Math.Min(3, size / 2));
        var transient = random.Next(1, size - classes);
        var weights = new double[size, size];
        for (var i = 0; i < size; i++)
        {
            if (i >= transient)
            {
                FillRecurrentRow(weights, i, transient, classes, random);
                continue;
            }

            weights[i, (i + 1) % transient] = random.NextFactor();
            for (var j = 0; j < size; j++)
            {
                var mayMove = j < transient ? random.NextChance(oneIn: 3) : i == 0 || random.NextChance(oneIn: 4);
                weights[i, j] = mayMove ? (j < transient ? 1 : exit) * random.NextFactor() : weights[i, j];
            }
        }

        return RowWeights.Normalized(weights);
    }

    /// <summary>Recurrent state k belongs to class k modulo the number of classes; each class is a ring with some chords.</summary>
    private static void FillRecurrentRow(double[,] weights, int state, int transient, int classes, SplitMix64 random)
    {
        var size = weights.GetLength(0);
        var next = state + classes < size ? state + classes : transient + ((state - transient) % classes);
        weights[state, next] = random.NextFactor();
        for (var j = transient; j < size; j++)
        {
            if ((j - state) % classes == 0 && random.NextChance(oneIn: 4))
            {
                weights[state, j] = random.NextFactor();
            }
        }
    }
}
