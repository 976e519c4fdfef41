using Stochastic.Chains.Kernels;

namespace Stochastic.Chains.Tests.Kernels;

public class GraphsTests
{
    public static TheoryData<int> Sizes => [1, 2, 3, 7, 8, 9, 127, 128, 129];

    [Theory]
    [MemberData(nameof(Sizes))]
    public void Every_nonzero_entry_is_an_arc_whatever_the_storage(int size)
    {
        var random = new Random(size);
        var table = new double[size * size];
        var triplets = new TripletList();
        var expected = new List<(int, int)>();
        for (var cell = 0; cell < table.Length; cell++)
        {
            if (random.Next(3) == 0)
            {
                table[cell] = random.Next(2) == 0 ? double.Epsilon : 1;
                triplets.Add(cell / size, cell % size, table[cell]);
                expected.Add((cell / size, cell % size));
            }
        }

        var rows = triplets.ToCompressedRows(size);

        Arcs(new DenseGraph(table, size)).Should().Equal(expected);
        Arcs(new SparseGraph(rows.Starts, rows.Columns)).Should().Equal(expected);
    }

    [Fact]
    public void A_zero_of_either_sign_is_no_arc()
    {
        Arcs(new DenseGraph([0, -0.0, 1, 0], 2)).Should().Equal((1, 0));
    }

    [Fact]
    public void A_walk_that_has_ended_stays_ended()
    {
        var dense = new DenseGraph([1.0], 1);
        var sparse = new SparseGraph([0, 1], [0]);

        foreach (var ends in new[] { EndsTwice(dense), EndsTwice(sparse) })
        {
            ends.Should().Equal(0, -1, -1);
        }
    }

    private static int[] EndsTwice<TGraph>(TGraph graph)
        where TGraph : struct, IGraph
    {
        var cursor = graph.FirstCursor(0);
        return [graph.NextTarget(0, ref cursor), graph.NextTarget(0, ref cursor), graph.NextTarget(0, ref cursor)];
    }

    private static List<(int From, int To)> Arcs<TGraph>(TGraph graph)
        where TGraph : struct, IGraph
    {
        var arcs = new List<(int, int)>();
        for (var node = 0; node < graph.NodeCount; node++)
        {
            var cursor = graph.FirstCursor(node);
            for (var target = graph.NextTarget(node, ref cursor); target >= 0; target = graph.NextTarget(node, ref cursor))
            {
                arcs.Add((node, target));
            }
        }

        return arcs;
    }
}
