using Stochastic.Chains.Kernels;

namespace Stochastic.Chains.Tests.Kernels;

/// <summary>Which tables of rates need no look at their products.</summary>
public class FullRatesTests
{
    private const int States = 9;

    [Fact]
    public void A_full_table_of_usual_rates_keeps_to_the_range_whatever_its_diagonal() => Keeps(table => table[0, 0] = double.NaN).Should().BeTrue();

    [Theory]
    [InlineData(0.0)]
    [InlineData(1e-61)]
    [InlineData(1e61)]
    public void One_rate_that_is_missing_or_far_out_is_enough_to_look(double rate)
    {
        foreach (var (from, to) in new[] { (0, 1), (4, 3), (4, 8), (8, 0), (8, 7) })
        {
            Keeps(table => table[from, to] = rate).Should().BeFalse($"the rate from {from} to {to} is {rate}");
        }
    }

    [Theory]
    [InlineData(0.0)]
    [InlineData(1e-61)]
    [InlineData(1e61)]
    public void One_holding_time_that_is_missing_or_far_out_is_enough_to_look(double time) =>
        Keeps(table => table[5, States] = time).Should().BeFalse();

    private static bool Keeps(Action<double[,]> change)
    {
        var table = new double[States, States + 1];
        for (var row = 0; row < States; row++)
        {
            for (var column = 0; column <= States; column++)
            {
                table[row, column] = row == column ? 0 : 0.1;
            }
        }

        change(table);
        return FullRates.KeepProducts(new MatrixView([.. table.Cast<double>()], 0, States + 1), States);
    }
}
