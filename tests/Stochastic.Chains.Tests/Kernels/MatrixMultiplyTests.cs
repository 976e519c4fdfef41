using Stochastic.Chains.Kernels;
using Stochastic.Chains.Tests.Support;

namespace Stochastic.Chains.Tests.Kernels;

/// <summary>
/// Products of small whole numbers, which doubles hold exactly in any order of addition: every entry must be right to the last bit, and
/// nothing around the target may be touched.
/// </summary>
public class MatrixMultiplyTests
{
    private const int Margin = 3;
    private const double Untouched = -1;

    public static TheoryData<string> InstructionSets =>
        [nameof(InstructionSet.Vector512), nameof(InstructionSet.Vector256), nameof(InstructionSet.Portable)];

    [Theory]
    [MemberData(nameof(InstructionSets))]
    public void Edges_of_every_width_are_added_and_nothing_beside_them(string vectors)
    {
        var instructions = Enum.Parse<InstructionSet>(vectors);
        for (var edge = 1; edge <= 25; edge++)
        {
            Check(edge, 9, 24 + edge, instructions);
            Check(8 + edge, edge, 7, instructions);
            Check(3, 200, edge, instructions);
        }
    }

    [Theory]
    [MemberData(nameof(InstructionSets))]
    public void Sizes_around_the_change_from_unpacked_to_packed_agree(string vectors)
    {
        var instructions = Enum.Parse<InstructionSet>(vectors);
        foreach (var size in new[] { 100, 127, 128, 129 })
        {
            Check(size, size, 100, instructions);
        }

        Check(130, 193, 385, instructions);
    }

    [Theory]
    [InlineData(1)]
    [InlineData(7)]
    [InlineData(66)]
    [InlineData(131)]
    public void The_diagonal_of_a_product_is_that_of_the_whole_product(int size)
    {
        var random = new SplitMix64((ulong)size);
        double[] left = Whole(size * size, random), right = Whole(size * size, random), sums = Whole(size, random);
        var expected = sums.Select((sum, k) => sum + Enumerable.Range(0, size).Sum(j => left[(k * size) + j] * right[(j * size) + k])).ToArray();

        ProductDiagonal.Add(new MatrixView(left, 0, size), new MatrixView(right, 0, size), sums);

        sums.Should().Equal(expected);
    }

    private static double[] Whole(int count, SplitMix64 random) => [.. Enumerable.Range(0, count).Select(_ => Math.Floor(16 * random.NextFraction()))];

    private static void Check(int rows, int inner, int columns, InstructionSet instructions)
    {
        var random = new SplitMix64((ulong)((rows * 1000) + columns));
        double[] left = Whole(rows * inner, random), right = Whole(inner * columns, random);
        var stride = columns + Margin;
        var target = new double[(rows + 1) * stride];
        Array.Fill(target, Untouched);
        var expected = (double[])target.Clone();
        for (var i = 0; i < rows; i++)
        {
            for (var j = 0; j < columns; j++)
            {
                for (var k = 0; k < inner; k++)
                {
                    expected[(i * stride) + j] += left[(i * inner) + k] * right[(k * columns) + j];
                }
            }
        }

        MatrixMultiply.Add(
            new MatrixView(left, 0, inner), new MatrixView(right, 0, columns), new MatrixView(target, 0, stride),
            rows, inner, columns, instructions, new WorkSharing(2, CancellationToken.None));

        target.Should().Equal(expected, $"{rows} x {inner} x {columns}, {instructions}");
    }
}
