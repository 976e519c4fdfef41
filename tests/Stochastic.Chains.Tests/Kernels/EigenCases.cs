namespace Stochastic.Chains.Tests.Kernels;

/// <summary>Matrices, row-major, on which eigenvalue iterations are known to have trouble, and some on which they have none. Seeded.</summary>
internal static class EigenCases
{
    private static readonly Dictionary<string, Func<int, Random, double[]>> Families = new()
    {
        ["uniform random"] = (order, random) => Table(order, (_, _) => random.NextDouble() - 0.5),
        ["random stochastic"] = RandomStochastic,
        ["sparse stochastic"] = (order, random) => Stochastic(order, (_, _) => random.Next(8) == 0 ? random.NextDouble() : 0),
        ["directed cycle"] = (order, _) => Cycle(order),
        ["walk on a cycle"] = (order, _) => CycleWalk(order),
        ["Ehrenfest urn"] = (order, _) => Ehrenfest(order),
        ["one Jordan block"] = (order, _) => Ageing(order),
        ["one Jordan block, reversed"] = (order, _) => Reversed(Ageing(order), order),
        ["nilpotent shift"] = (order, _) => Table(order, (row, column) => row == column + 1 ? 1 : 0),
        ["random permutation"] = (order, random) => Permutation(Shuffled(order, random)),
        ["identity"] = (order, _) => Table(order, (row, column) => row == column ? 1 : 0),
        ["zero"] = (order, _) => new double[order * order],
        ["rank one"] = (order, _) => Table(order, (_, column) => column + 1),
        ["triangular"] = (order, random) => Table(order, (row, column) => column >= row ? random.NextDouble() : 0),
        ["symmetric"] = (order, random) => Symmetric(order, random, 1),
        ["skew-symmetric"] = (order, random) => Symmetric(order, random, -1),
        ["companion"] = (order, random) => Table(order, (row, column) => row == 0 ? random.NextDouble() - 0.5 : row == column + 1 ? 1 : 0),
        ["Frank"] = (order, _) => Table(order, (row, column) => row > column + 1 ? 0 : order - Math.Max(row, column)),
        ["graded"] = (order, random) => Table(order, (row, column) => random.NextDouble() * Math.Pow(10, -row - column)),
        ["steeply graded"] = (order, random) => Table(order, (row, column) => random.NextDouble() * Math.Pow(10, -5.0 * (row + column))),
        ["graded upwards"] = (order, random) => Table(order, (row, column) => random.NextDouble() * Math.Pow(10, row + column - (2.0 * order))),
        ["coupling 1e-3"] = (order, random) => NearlyDecomposable(order, random, 1e-3),
        ["coupling 1e-14"] = (order, random) => NearlyDecomposable(order, random, 1e-14),
        ["coupling 1e-100"] = (order, random) => NearlyDecomposable(order, random, 1e-100),
        ["reducible"] = (order, random) => Stochastic(order, (row, column) => row < order / 2 || column >= order / 2 ? random.NextDouble() : 0),
        ["near the largest double"] = (order, random) => Table(order, (_, _) => (random.NextDouble() - 0.5) * 1e300),
        ["near the smallest double"] = (order, random) => Table(order, (_, _) => (random.NextDouble() - 0.5) * 1e-290),
        ["equal entries"] = (order, _) => Table(order, (_, _) => 1.0 / order),
    };

    /// <summary>Every family at orders around the edges of the batches of reflectors (24) and of the vector panels (16).</summary>
    internal static IEnumerable<(string Name, int Order, double[] Matrix)> All =>
        from family in Families
        from order in (int[])[1, 2, 3, 4, 5, 8, 16, 23, 24, 25, 26, 27, 28, 49, 51]
        select (family.Key, order, family.Value(order, new Random(order)));

    internal static TheoryData<string> Names => new(Families.Keys);

    internal static IEnumerable<(string Name, int Order, double[] Matrix)> Of(string family) => All.Where(item => item.Name == family);

    internal static double[] Table(int order, Func<int, int, double> entry) =>
        [.. from row in Enumerable.Range(0, order) from column in Enumerable.Range(0, order) select entry(row, column)];

    internal static double[] RandomStochastic(int order, Random random) => Stochastic(order, (_, _) => random.NextDouble());

    internal static double[] Cycle(int order) => Table(order, (row, column) => column == (row + 1) % order ? 1 : 0);

    internal static double[] CycleWalk(int order)
    {
        var forward = Cycle(order);
        return Table(order, (row, column) => (forward[(row * order) + column] + forward[(column * order) + row]) / 2);
    }

    /// <summary>The urn with order − 1 balls; state = balls in the first half.</summary>
    internal static double[] Ehrenfest(int order)
    {
        var balls = Math.Max(order - 1, 1);
        return Table(order, (row, column) => column == row - 1 ? (double)row / balls : column == row + 1 ? (double)(balls - row) / balls : 0);
    }

    /// <summary>Stay or grow older, one half each; the last age stays: eigenvalue 1/2 in one Jordan block of order − 1, and 1.</summary>
    internal static double[] Ageing(int order) =>
        Table(order, (row, column) => row == order - 1 ? (column == row ? 1 : 0) : column == row || column == row + 1 ? 0.5 : 0);

    internal static double[] Reversed(double[] matrix, int order) =>
        Table(order, (row, column) => matrix[((order - 1 - row) * order) + order - 1 - column]);

    internal static int[] Shuffled(int order, Random random)
    {
        var images = Enumerable.Range(0, order).ToArray();
        random.Shuffle(images);
        return images;
    }

    internal static double[] Permutation(int[] images) => Table(images.Length, (row, column) => images[row] == column ? 1 : 0);

    internal static double[] NearlyDecomposable(int order, Random random, double coupling) =>
        Stochastic(order, (row, column) => random.NextDouble() * (row < order / 2 == column < order / 2 ? 1 : coupling));

    private static double[] Symmetric(int order, Random random, int sign)
    {
        var upper = Table(order, (row, column) => column >= row ? random.NextDouble() - 0.5 : 0);
        return Table(order, (row, column) => upper[(row * order) + column] + (sign * upper[(column * order) + row]));
    }

    private static double[] Stochastic(int order, Func<int, int, double> weight)
    {
        var weights = Table(order, weight);
        var sums = weights.Chunk(order).Select(row => row.Sum()).ToArray();
        return Table(order, (row, column) => sums[row] == 0 ? (row == column ? 1 : 0) : weights[(row * order) + column] / sums[row]);
    }
}
