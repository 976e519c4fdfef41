using Stochastic.Chains.Kernels;

namespace Stochastic.Chains.Tests.Kernels;

public class RowEntriesTests
{
    [Fact]
    public void A_dense_row_gives_its_nonzero_entries_with_their_places()
    {
        Read([], [0, 0.25, 0, -0.0, 0.75, 0]).Should().Equal((1, 0.25), (4, 0.75));
    }

    [Fact]
    public void A_sparse_row_gives_its_entries_with_their_columns()
    {
        Read([3, 70, 1000], [0.25, 0.5, 0.25]).Should().Equal((3, 0.25), (70, 0.5), (1000, 0.25));
    }

    [Fact]
    public void Zeros_that_are_stored_are_passed_over()
    {
        Read([3, 70, 1000], [0, 0.5, 0]).Should().Equal((70, 0.5));
    }

    [Fact]
    public void An_empty_row_gives_nothing()
    {
        Read([], []).Should().BeEmpty();
        Read([], [0, 0]).Should().BeEmpty();
        Read([4], [0]).Should().BeEmpty();
    }

    [Fact]
    public void A_row_can_be_read_again_from_its_start()
    {
        var row = new RowEntries([1, 2], [0.5, 0.5]);
        var count = 0;
        for (var pass = 0; pass < 2; pass++)
        {
            foreach (var _ in row)
            {
                count++;
            }
        }

        count.Should().Be(4);
    }

    private static List<(int Column, double Value)> Read(int[] columns, double[] values)
    {
        var entries = new List<(int, double)>();
        foreach (var entry in new RowEntries(columns, values))
        {
            entries.Add(entry);
        }

        return entries;
    }
}
