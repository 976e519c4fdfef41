using Stochastic.Chains.Kernels;

namespace Stochastic.Chains.Tests.Kernels;

public class TripletListTests
{
    private const int Block = 1 << 16;

    public static TheoryData<int> Counts => [0, 1, 2, Block - 1, Block, Block + 1, 2 * Block, (2 * Block) + 1];

    [Theory]
    [MemberData(nameof(Counts))]
    public void Entries_come_out_by_row_with_ascending_columns(int count)
    {
        var random = new Random(count);
        var entries = Enumerable.Range(0, count).Select(k => (Row: random.Next(300), Column: random.Next(1_000_000), Value: (double)k)).ToList();
        var list = new TripletList();
        foreach (var (row, column, value) in entries)
        {
            list.Add(row, column, value);
        }

        list.Count.Should().Be(count);
        var rows = list.ToCompressedRows(300);

        rows.RowCount.Should().Be(300);
        rows.EntryCount.Should().Be(count);
        var found = Enumerable.Range(0, 300).SelectMany(row => rows.RowColumns(row).ToArray().Zip(rows.RowValues(row).ToArray(), (column, value) => (row, column, value)));
        found.OrderBy(entry => entry.value).SequenceEqual(entries).Should().BeTrue("every entry keeps its row, column and value");
        Enumerable.Range(0, 300).All(row => rows.RowColumns(row).ToArray() is var columns && columns.Order().SequenceEqual(columns)).Should().BeTrue();
    }

    [Fact]
    public void Entries_of_one_cell_stay_side_by_side()
    {
        var list = new TripletList();
        list.Add(1, 5, 0.1);
        list.Add(1, 2, 0.2);
        list.Add(0, 5, 0.3);
        list.Add(1, 5, 0.4);

        var rows = list.ToCompressedRows(3);

        rows.Starts.Should().Equal(0, 1, 4, 4);
        rows.Columns.Should().Equal(5, 2, 5, 5);
        rows.RowValues(1).ToArray().Should().BeEquivalentTo([0.2, 0.1, 0.4]);
        rows.RowColumns(2).Length.Should().Be(0);
    }

    [Fact]
    public void The_list_is_empty_after_its_entries_have_moved_and_can_be_filled_again()
    {
        var list = new TripletList();
        list.Add(0, 0, 1);
        list.ToCompressedRows(1);

        list.Count.Should().Be(0);
        list.Add(0, 0, 2);
        list.ToCompressedRows(1).Values.Should().Equal(2);
    }
}
