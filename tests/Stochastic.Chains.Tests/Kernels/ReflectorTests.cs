using Stochastic.Chains.Kernels;

namespace Stochastic.Chains.Tests.Kernels;

public class ReflectorTests
{
    [Theory]
    [InlineData(3, 4)]
    [InlineData(-3, 4)]
    [InlineData(0, 5)]
    [InlineData(5, 1e-200)]
    [InlineData(3e300, 4e300)]
    [InlineData(3e-300, -4e-300)]
    [InlineData(1e-320, 1e-320)]
    public void A_reflector_turns_its_vector_into_the_first_axis(double head, double tail)
    {
        double[] vector = [head, tail];

        var beta = HouseholderReflector.Form(vector, out var image);

        var size = Math.Max(Math.Abs(head), Math.Abs(tail));
        var length = size * double.Hypot(head / size, tail / size);
        Math.Abs(image).Should().BeApproximately(length, Math.Max(1e-15 * length, double.Epsilon));
        (beta * (1 + (vector[1] * vector[1]))).Should().BeApproximately(2, 1e-15, "only then is I − β v vᵀ orthogonal");
        var product = beta * ((head / size) + (vector[1] * (tail / size)));
        ((head / size) - product).Should().BeApproximately(image / size, Math.Max(1e-15, double.Epsilon / size));
        ((tail / size) - (vector[1] * product)).Should().BeApproximately(0, 1e-15);
    }

    [Theory]
    [InlineData(0)]
    [InlineData(-2.5)]
    public void Where_the_tail_is_zero_nothing_is_reflected(double head)
    {
        double[] vector = [head, 0, 0];

        HouseholderReflector.Form(vector, out var image).Should().Be(0);

        image.Should().Be(head);
        vector.Should().Equal(1, 0, 0);
    }

    public static TheoryData<int, int, bool> Chains
    {
        get
        {
            var chains = new TheoryData<int, int, bool>();
            foreach (var count in (int[])[1, 2, 5, 24])
            {
                foreach (var width in (int[])[1, 3, 15, 16, 17, 40])
                {
                    chains.Add(count, width, false);
                    chains.Add(count, width, true);
                }
            }

            return chains;
        }
    }

    [Theory]
    [MemberData(nameof(Chains))]
    public void A_chain_applies_its_reflectors_one_after_the_other(int count, int width, bool endsInPair)
    {
        const int firstRow = 2;
        var random = new Random((count * 100) + width);
        var chain = new ReflectorChain(24);
        var rows = firstRow + count + 2;
        var stride = width + 3;
        var table = Enumerable.Range(0, rows * stride).Select(_ => random.NextDouble() - 0.5).ToArray();
        var (expected, transposed) = (table.ToArray(), EigenTransposed(table, rows, stride));

        chain.Restart(firstRow);
        for (var index = 0; index < count; index++)
        {
            double[] vector = [random.NextDouble() - 0.5, random.NextDouble() - 0.5, random.NextDouble() - 0.5];
            var isPair = endsInPair && index == count - 1;
            var used = isPair ? vector.AsSpan(0, 2) : vector;
            var beta = HouseholderReflector.Form(used, out _);
            if (isPair)
            {
                chain.AddPair(beta, used[1]);
            }
            else
            {
                chain.Add(beta, used[1], used[2]);
            }

            Apply(expected, stride, firstRow + index, 2, width, beta, used);
        }

        chain.ApplyToRows(table, stride, 2, width);
        table.Should().SatisfyRespectively(expected.Select(entry => (Action<double>)(actual => actual.Should().BeApproximately(entry, 1e-14))));

        chain.ApplyToColumns(transposed, rows, 2 + width);
        var turned = EigenTransposed(transposed, stride, rows);
        for (var row = 0; row < rows; row++)
        {
            // The first two columns are reflected here as well; they were not above.
            turned.AsSpan((row * stride) + 2, width).ToArray().Zip(expected.Skip((row * stride) + 2), (first, second) => Math.Abs(first - second))
                .Should().OnlyContain(difference => difference <= 1e-14);
        }
    }

    [Fact]
    public void An_empty_chain_changes_nothing()
    {
        double[] table = [1, 2, 3, 4];
        var chain = new ReflectorChain(4);
        chain.Restart(0);

        chain.ApplyToRows(table, 2, 0, 2);
        chain.ApplyToColumns(table, 2, 2);

        table.Should().Equal(1, 2, 3, 4);
    }

    private static void Apply(double[] table, int stride, int row, int column, int width, double beta, ReadOnlySpan<double> vector)
    {
        for (var index = column; index < column + width; index++)
        {
            var sum = 0.0;
            for (var offset = 0; offset < vector.Length; offset++)
            {
                sum += beta * vector[offset] * table[((row + offset) * stride) + index];
            }

            for (var offset = 0; offset < vector.Length; offset++)
            {
                table[((row + offset) * stride) + index] -= vector[offset] * sum;
            }
        }
    }

    private static double[] EigenTransposed(double[] table, int rows, int columns) =>
        [.. from column in Enumerable.Range(0, columns) from row in Enumerable.Range(0, rows) select table[(row * columns) + column]];
}
