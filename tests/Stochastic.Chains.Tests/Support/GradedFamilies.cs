namespace Stochastic.Chains.Tests.Support;

/// <summary>Irreducible chains whose probabilities span many orders of magnitude.</summary>
internal static class GradedFamilies
{
    private const int DeepestStationary = 240;
    private const int DeepestTransition = 300;

    /// <summary>Dense blocks, joined by moves of the size of one coupling parameter between 1e-2 and 1e-250.</summary>
    public static double[,] NearlyDecomposable(int size, SplitMix64 random)
    {
        var blocks = random.Next(2, Math.Max(2, Math.Min(5, size / 2)));
        var coupling = RowWeights.PowerOfTen(-random.Next(2, 250));
        var weights = new double[size, size];
        for (var i = 0; i < size; i++)
        {
            for (var j = 0; j < size; j++)
            {
                var isRing = i < blocks && j == (i + 1) % blocks;
                weights[i, j] = i % blocks == j % blocks
                    ? random.NextFactor()
                    : (isRing || random.NextChance(oneIn: 8) ? coupling * random.NextFactor() : 0);
            }
        }

        return RowWeights.Normalized(weights);
    }

    /// <summary>Blocks inside blocks: a move between i and j is smaller by one coupling for each level that separates them.</summary>
    public static double[,] NestedDecomposable(int size, SplitMix64 random)
    {
        var levels = Level(0, size - 1);
        var exponent = random.Next(1, 250 / levels);
        var weights = new double[size, size];
        for (var i = 0; i < size; i++)
        {
            for (var j = 0; j < size; j++)
            {
                weights[i, j] = RowWeights.PowerOfTen(-exponent * Level(i, j)) * random.NextFactor();
            }
        }

        return RowWeights.Normalized(weights);

        static int Level(int i, int j) => int.Log2((2 * (i ^ j)) | 1);
    }

    /// <summary>
    /// Stationary probabilities near 10^-g_i with g between 0 and 240, moves down to 1e-300: every pair of states is in rough balance, off
    /// by a random factor of at most ten, so that the chain is not reversible.
    /// </summary>
    public static double[,] Graded(int size, SplitMix64 random)
    {
        var depth = random.Next(1, DeepestStationary);
        var grades = Grades(size, depth, random);
        var moves = new double[size, size];
        for (var i = 0; i < size; i++)
        {
            for (var j = i + 1; j < size; j++)
            {
                if (j == i + 1 || random.NextChance(oneIn: 2))
                {
                    var slowness = random.NextChance(oneIn: 2) ? 0 : random.Next(0, DeepestTransition - depth);
                    moves[i, j] = Move(grades[i], grades[j], slowness, random) / size;
                    moves[j, i] = Move(grades[j], grades[i], slowness, random) / size;
                }
            }
        }

        return RowWeights.WithStays(moves);
    }

    /// <summary>Neighbours only; otherwise as <see cref="Graded"/>.</summary>
    public static double[,] BirthDeath(int size, SplitMix64 random)
    {
        var depth = random.Next(1, DeepestStationary);
        var grades = Grades(size, depth, random);
        var moves = new double[size, size];
        for (var i = 0; i < size - 1; i++)
        {
            var slowness = random.NextChance(oneIn: 2) ? 0 : random.Next(0, DeepestTransition - depth);
            moves[i, i + 1] = Move(grades[i], grades[i + 1], slowness, random) / 2;
            moves[i + 1, i] = Move(grades[i + 1], grades[i], slowness, random) / 2;
        }

        return RowWeights.WithStays(moves);
    }

    /// <summary>State 0 is entered with a probability between 1e-5 and 1e-250 per step, from every third state, and left at once.</summary>
    public static double[,] RareTarget(int size, SplitMix64 random)
    {
        var rarity = RowWeights.PowerOfTen(-random.Next(5, 250));
        var weights = new double[size, size];
        for (var i = 0; i < size; i++)
        {
            for (var j = 1; j < size; j++)
            {
                weights[i, j] = random.NextFactor();
            }

            weights[i, 0] = i == 1 || (i > 1 && random.NextChance(oneIn: 3)) ? rarity * random.NextFactor() : 0;
        }

        return RowWeights.Normalized(weights);
    }

    /// <summary>State 0 is easily entered and left with a probability between 1e-5 and 1e-250 per step.</summary>
    public static double[,] NearAbsorbing(int size, SplitMix64 random)
    {
        var rarity = RowWeights.PowerOfTen(-random.Next(5, 250));
        var weights = new double[size, size];
        for (var i = 0; i < size; i++)
        {
            for (var j = 0; j < size; j++)
            {
                weights[i, j] = i == 0 && j > 0 ? rarity * random.NextFactor() : random.NextFactor();
            }
        }

        return RowWeights.Normalized(weights);
    }

    public static double[,] TwoStates(int size, SplitMix64 random) => RowWeights.WithStays(new[,]
    {
        { 0, RowWeights.PowerOfTen(-random.Next(0, DeepestStationary)) * random.NextFactor() },
        { RowWeights.PowerOfTen(-random.Next(0, DeepestStationary)) * random.NextFactor(), 0 },
    });

    private static int[] Grades(int size, int depth, SplitMix64 random)
    {
        var grades = new int[size];
        for (var i = 1; i < size; i++)
        {
            grades[i] = random.Next(0, depth);
        }

        return grades;
    }

    private static double Move(int fromGrade, int toGrade, int slowness, SplitMix64 random) =>
        RowWeights.PowerOfTen(-Math.Max(0, toGrade - fromGrade) - slowness) * random.NextFactor();
}
