using Stochastic.Chains.Internal;

namespace Stochastic.Chains.Estimation;

/// <summary>Writes counts as text: one line for many states, a table with row totals for few.</summary>
internal static class CountsText
{
    private const int LargestTable = 12;

    internal static string Write<TState>(TransitionCounts<TState> counts)
        where TState : notnull
    {
        var along = counts.PathCount > 0 ? $" along {Text.Count(counts.PathCount, "path", "paths")}" : string.Empty;
        var heading = $"{Text.Count(counts.TotalCount, "move", "moves")}{along} between {Text.Count(counts.States.Count, "state", "states")}";
        if (counts.States.Count > LargestTable)
        {
            return $"{heading}: {Text.List(counts.States)}";
        }

        var table = new TextTable(["from \\ to", .. counts.States.Select(state => Text.Label(state)), "total"]);
        foreach (var from in counts.States)
        {
            table.AddRow([Text.Label(from), .. counts.States.Select(to => Cell(counts[from, to])), Text.Count(counts.TotalFrom(from))]);
        }

        return $"{heading}{Environment.NewLine}{table}";
    }

    private static string Cell(long count) => count == 0 ? "·" : Text.Count(count);
}
