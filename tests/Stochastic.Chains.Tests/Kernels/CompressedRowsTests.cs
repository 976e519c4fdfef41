using Stochastic.Chains.Kernels;

namespace Stochastic.Chains.Tests.Kernels;

public class CompressedRowsTests
{
    private static readonly CompressedRows Rows = new([0, 2, 2, 3], [0, 4, 1], [0.25, 0.75, 1]);

    [Fact]
    public void Rows_lie_between_their_starts()
    {
        Rows.RowCount.Should().Be(3);
        Rows.EntryCount.Should().Be(3);
        Rows.RowColumns(0).ToArray().Should().Equal(0, 4);
        Rows.RowValues(0).ToArray().Should().Equal(0.25, 0.75);
        Rows.RowColumns(1).Length.Should().Be(0);
        Rows.RowValues(2).ToArray().Should().Equal(1);
    }
}
