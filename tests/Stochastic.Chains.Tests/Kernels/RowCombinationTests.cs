using Stochastic.Chains.Kernels;

namespace Stochastic.Chains.Tests.Kernels;

public class RowCombinationTests
{
    [Theory]
    [InlineData(1)]
    [InlineData(3)]
    [InlineData(7)]
    [InlineData(8)]
    [InlineData(9)]
    [InlineData(16)]
    [InlineData(21)]
    public void Combinations_are_the_product_of_factors_and_table(int order)
    {
        // Whole numbers, so that every order of summation gives the same.
        var random = new Random(order);
        var table = EigenCases.Table(order, (_, _) => random.Next(-9, 10));
        foreach (var factors in new[]
        {
            EigenCases.Table(order, (_, _) => random.Next(-9, 10)),
            EigenCases.Table(order, (row, column) => column <= row ? random.Next(-9, 10) : 0),
            EigenCases.Table(order, (row, column) => column >= row ? random.Next(-9, 10) : 0),
            new double[order * order],
        })
        {
            var sums = EigenCases.Table(order, (_, _) => double.NaN);
            var one = new double[order];

            RowCombinations.OfMany(factors, table, order, sums);
            RowCombinations.OfOne(factors.AsSpan(0, order), table, one);

            sums.Should().Equal(EigenChecks.Product(factors, table, order));
            one.Should().Equal(sums.Take(order));
        }
    }
}
