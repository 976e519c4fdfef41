using Stochastic.Chains.Benchmarks.Accuracy;
using Stochastic.Chains.Benchmarks.Measuring;

namespace Stochastic.Chains.Benchmarks.Report;

/// <summary>Errors against exact arithmetic, beside what was claimed.</summary>
internal static class AccuracyPage
{
    private static readonly int[] ShownCouplings = [3, 6, 9, 12, 15];

    internal static string Of(ResultFile<Measured> file)
    {
        var tables = file.Rows.Select(row => row.Question).Distinct().Select(question => $"## {question}\n\n{Table(file.Rows, question)}");
        return $"""
            # Errors against exact arithmetic

            {MachineTable.Of(file.Machine)}
            Chains of {AccuracyFamily.States} states, {file.Rows[0].Chains} of each family. A cell gives the largest relative error of any entry of any answer, by exact
            rational arithmetic, and after it what the certificates claimed at most: a bound on relative errors, or where there is none, on absolute ones. Where a method
            refused or did not converge, it says how many of the chains were answered. Of {file.Rows.Sum(row => row.Answered)} answers, {file.Rows.Sum(row => row.Violations)} were
            further off than their certificate claims.

            ![Error against coupling, for every method](error-against-coupling.svg)

            {string.Join('\n', tables)}
            All couplings and all figures are in [accuracy.csv](accuracy.csv).
            """;
    }

    /// <summary>Methods down, families across.</summary>
    internal static string Table(IReadOnlyList<Measured> rows, string question)
    {
        List<Measured> own = [.. rows.Where(row => row.Question == question && IsShown(row))];
        List<string> families = [.. own.Select(Heading).Distinct()];
        return MarkdownTable.Of(
            ["Method", .. families],
            own.GroupBy(row => row.Method).Select(method => (string[])[method.Key, .. families.Select(family => Cell(method.Single(row => Heading(row) == family)))]));
    }

    private static bool IsShown(Measured row) => double.IsNaN(row.Coupling) || ShownCouplings.Contains((int)Math.Round(-Math.Log10(row.Coupling)));

    private static string Heading(Measured row) => double.IsNaN(row.Coupling) ? row.Family : $"{row.Family}, {Figures.Order(row.Coupling)}";

    private static string Cell(Measured row)
    {
        if (row.Answered == 0)
        {
            return "no answer";
        }

        var claim = row.BoundKind switch
        {
            BoundKind.Relative => $"≤ {Figures.Order(row.Bound)}",
            BoundKind.Absolute => $"absolute ≤ {Figures.Order(row.Bound)}",
            _ => "no bound",
        };
        var answered = row.Answered < row.Chains ? $", {row.Answered} of {row.Chains}" : string.Empty;
        var violations = row.Violations > 0 ? $", **{row.Violations} violations**" : string.Empty;
        return $"{Figures.Order(row.Error)}; {claim}{answered}{violations}";
    }
}
