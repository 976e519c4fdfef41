using Stochastic.Chains.Tests.Support;
using Pair = (Stochastic.Chains.Tests.Support.PublishedNumber Published, double Computed);

namespace Stochastic.Chains.Tests.Published;

/// <summary>The library's answers to published questions about counts: estimates, fits and tests.</summary>
internal static class CountAnswers
{
    private const double LargeExpectation = 5;

    internal static IEnumerable<Pair> Probabilities(PublishedQuery query)
    {
        var estimate = Counts(query).Estimate();
        return Table(query, (from, to) => estimate[from, to]);
    }

    internal static IEnumerable<Pair> StandardErrors(PublishedQuery query) => Table(query, Counts(query).Estimate().StandardError);

    internal static IEnumerable<Pair> ExpectedCounts(PublishedQuery query) =>
        query.Matrix().SelectMany(row => row).Zip(Independence(query).Cells.Select(cell => cell.Expected));

    /// <summary>The cells that the book tests: those whose expected count is above five.</summary>
    internal static IEnumerable<Pair> LargeCells(PublishedQuery query) =>
    [
        (query.Scalar(), Independence(query).Cells.Where(cell => cell.Expected > LargeExpectation)
            .Sum(cell => (cell.Observed - cell.Expected) * (cell.Observed - cell.Expected) / cell.Expected)),
    ];

    internal static ChainTest Independence(PublishedQuery query) => Counts(query).TestIndependence();

    internal static ChainTest Homogeneity(PublishedQuery query) => query.Case.Input.GetProperty("groups").EnumerateArray()
        .Select((group, number) => ($"group {number}", Counts([.. group.EnumerateArray().Select(row => row.EnumerateArray().Select(count => count.GetInt64()).ToArray())])))
        .TestHomogeneity();

    internal static ChainTest GroupsOrOrder(PublishedQuery query) =>
        query.Case.InputKind == "counts_groups" ? Homogeneity(query) : Independence(query);

    /// <summary>A figure of the fit of order 0 and of order 1, the latter by the estimate and by the test alike.</summary>
    internal static IEnumerable<Pair> Fits(PublishedQuery query, Func<ModelFit, double> figure)
    {
        var test = Independence(query);
        var fits = new[] { test.Null, Counts(query).Estimate().Fit };
        test.Alternative.Should().Be(fits[1]);
        return query.Vector().Zip(query.States("order").Select(order => figure(fits[order])));
    }

    internal static TransitionCounts<int> Counts(PublishedQuery query) => Counts(PublishedInput.Counts(query.Case));

    private static TransitionCounts<int> Counts(long[][] rows)
    {
        var table = new long[rows.Length, rows.Length];
        for (var row = 0; row < rows.Length; row++)
        {
            for (var column = 0; column < rows.Length; column++)
            {
                table[row, column] = rows[row][column];
            }
        }

        return TransitionCounts.FromCounts([.. Enumerable.Range(0, rows.Length)], table);
    }

    private static IEnumerable<Pair> Table(PublishedQuery query, Func<int, int, double> figure) =>
        query.Matrix().SelectMany((row, from) => row.Select((published, to) => (published, figure(from, to))));
}
