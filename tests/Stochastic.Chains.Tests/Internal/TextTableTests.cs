using Stochastic.Chains.Internal;

namespace Stochastic.Chains.Tests.Internal;

public class TextTableTests
{
    [Fact]
    public void The_first_column_stands_left_and_the_others_right()
    {
        var table = new TextTable(["state", "mean"]);
        table.AddRow(["a", "1"]);
        table.AddRow(["in wash", "12.5"]);

        table.ToString().Split(Environment.NewLine).Should().Equal("state    mean", "a           1", "in wash  12.5");
    }

    [Fact]
    public void A_long_label_is_cut_with_an_ellipsis()
    {
        var table = new TextTable(["state"]);
        table.AddRow([new string('x', 32)]);
        table.AddRow([new string('y', 33)]);

        table.ToString().Split(Environment.NewLine)[1..].Should().Equal(new string('x', 32), new string('y', 31) + "…");
    }
}
