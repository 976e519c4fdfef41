using Stochastic.Chains.Benchmarks.Growth;
using Stochastic.Chains.Benchmarks.Measuring;

namespace Stochastic.Chains.Benchmarks.Report;

/// <summary>Time and memory against size.</summary>
internal static class GrowthPage
{
    /// <summary>Small sizes show what a call costs at all, not how it grows.</summary>
    private const int FittedSizes = 3;

    internal static string Of(ResultFile<GrowthRow> file) => $"""
        # Growth with size

        {MachineTable.Of(file.Machine)}
        Whole calls without evidence unless it says so, on one thread. A slope is that of the straight line through the {FittedSizes} largest sizes, both axes logarithmic: twice the
        size takes 2 to that power times as much. Memory is what the first call in a new process allocates, working memory included; later calls
        find that in a pool and allocate little more than their answer.

        {Table(file.Rows)}
        ![Time against size](growth.svg)

        ## All sizes

        {All(file.Rows)}
        """;

    internal static string Table(IReadOnlyList<GrowthRow> rows) => MarkdownTable.Of(
        ["Question", "Grows with", "Largest:", "Takes, ms:", "Slope:", "In theory:", "First call:", "Slope:", "In theory:", "Later calls:"],
        rows.GroupBy(row => row.Question).Select(curve =>
        {
            var last = curve.Last();
            return new[]
            {
                curve.Key, last.Measure, Size(last), Figures.Milliseconds(last.Milliseconds), Slope(curve, row => row.Milliseconds), $"≤ {Figures.Short(last.Order)}",
                Figures.Bytes(last.FirstBytes), Slope(curve, row => row.FirstBytes), $"≤ {Figures.Short(last.MemoryOrder)}", Figures.Bytes(last.LaterBytes),
            };
        }));

    private static string All(IEnumerable<GrowthRow> rows) => MarkdownTable.Of(
        ["Question", "Size:", "Takes, ms:", "First call:", "Later calls:"],
        rows.Select(row => new[]
        {
            row.Question, $"{Size(row)} {row.Measure}", Figures.Milliseconds(row.Milliseconds), Figures.Bytes(row.FirstBytes), Figures.Bytes(row.LaterBytes),
        }));

    private static string Size(GrowthRow row) => FormattableString.Invariant($"{row.Size:N0}");

    /// <summary>Least squares on logarithms.</summary>
    private static string Slope(IEnumerable<GrowthRow> curve, Func<GrowthRow, double> amount)
    {
        List<GrowthRow> fitted = [.. curve.TakeLast(FittedSizes)];
        var (_, slope) = MathNet.Numerics.Fit.Line(
            [.. fitted.Select(row => Math.Log(row.Size))], [.. fitted.Select(row => Math.Log(amount(row)))]);
        return slope.ToString("F1", System.Globalization.CultureInfo.InvariantCulture);
    }
}
