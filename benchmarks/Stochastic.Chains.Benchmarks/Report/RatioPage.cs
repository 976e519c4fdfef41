using Stochastic.Chains.Benchmarks.Measuring;
using Stochastic.Chains.Benchmarks.Ratios;

namespace Stochastic.Chains.Benchmarks.Report;

/// <summary>Times beside those of general-purpose libraries.</summary>
internal static class RatioPage
{
    internal static string Of(ResultFile<Ratio> file)
    {
        var missed = file.Rows.Count(row => row.Misses);
        return $"""
            # Times beside general-purpose libraries

            {MachineTable.Of(file.Machine)}
            Every contender of a line worked on the same input and gave the same figure; they took turns in one session, on one thread, and the least time of each
            counts. The library's time is that of the whole call, without evidence and with its proof (the default). A rival's time is that of its operation alone:
            what one would have to write around it is not counted. A ratio below one means that the library is faster.

            ## Targets

            {missed} of {file.Rows.Count(row => row.HasTarget)} targets are missed.

            {Targets(file.Rows)}
            ## All ratios

            {All(file.Rows)}
            """;
    }

    /// <summary>The ratios that are aimed at; a miss is shown as one.</summary>
    internal static string Targets(IEnumerable<Ratio> rows) => MarkdownTable.Of(
        ["Question", "Input", "Against", "Ratio:", "Target:", "Verdict"],
        rows.Where(row => row.HasTarget).Select(row => new[]
        {
            row.Question, row.Input, row.Rival, Value(row.Value), $"≤ {Figures.Short(row.Target)}", row.Misses ? "**missed**" : "met",
        }));

    private static string All(IEnumerable<Ratio> rows) => MarkdownTable.Of(
        ["Question", "Input", "Library, ms:", "Proved, ms:", "Against", "Takes, ms:", "Ratio:", "Ratio, proved:"],
        rows.Select(row => new[]
        {
            row.Question, row.Input, Figures.Milliseconds(row.Milliseconds), Figures.Milliseconds(row.ProvedMilliseconds), row.Rival,
            Figures.Milliseconds(row.RivalMilliseconds), Value(row.Value), Value(row.ProvedValue),
        }));

    private static string Value(double ratio) => double.IsPositiveInfinity(ratio) ? "no answer" : Figures.Short(ratio);
}
