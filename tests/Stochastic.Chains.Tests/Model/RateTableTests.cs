using Stochastic.Chains.Kernels;

namespace Stochastic.Chains.Tests.Model;

/// <summary>The table of a direct solve holds the rates of the states asked for, in the order asked for.</summary>
public class RateTableTests
{
    [Fact]
    public void All_states_in_another_order_than_their_own_come_in_that_order()
    {
        var chain = Chain.FromMatrix(new[,] { { 0.5, 0.25, 0.25 }, { 0.125, 0.75, 0.125 }, { 0.0625, 0.0625, 0.875 } });
        using var table = WorkTable.Rent(3, 3);

        RateTable.Among(chain.Matrix, [2, 1, 0]).CopyTo(table.View);

        (table.View[0, 1], table.View[0, 2]).Should().Be((0.0625, 0.0625));
        (table.View[1, 0], table.View[1, 2]).Should().Be((0.125, 0.125));
        (table.View[2, 0], table.View[2, 1]).Should().Be((0.25, 0.25));
    }

    [Fact]
    public void Two_states_exchanged_bring_their_rates_with_them()
    {
        var chain = Chain.FromMatrix(new[,] { { 0.5, 0.5 }, { 0.25, 0.75 } });
        using var table = WorkTable.Rent(2, 2);

        RateTable.Among(chain.Matrix, [1, 0]).CopyTo(table.View);

        (table.View[0, 1], table.View[1, 0]).Should().Be((0.25, 0.5));
    }
}
