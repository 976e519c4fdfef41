using System.Globalization;
using Stochastic.Chains.Internal;

namespace Stochastic.Chains.Passage;

/// <summary>Writes a table of mean first passage times so that it fits a terminal.</summary>
internal static class FirstPassageText
{
    private const int MostRows = 24;
    private const int WidestLine = 80;
    private const int Gap = 2;

    internal static string Write<TState>(FirstPassageTable<TState> table)
        where TState : notnull
    {
        var rows = Math.Min(table.States.Count, MostRows);
        var shown = new List<string[]>();
        var width = Math.Max("from \\ to".Length, table.States.Take(rows).Max(state => Text.Shorten(Text.Label(state)).Length));
        foreach (var to in table.States)
        {
            string[] column = [Text.Label(to), .. table.States.Take(rows).Select(from => table[from, to].ToString("G5", CultureInfo.InvariantCulture))];
            width += Gap + column.Max(cell => Text.Shorten(cell).Length);
            if (shown.Count > 0 && width > WidestLine)
            {
                break;
            }

            shown.Add(column);
        }

        var text = new TextTable(["from \\ to", .. shown.Select(column => column[0])]);
        for (var row = 0; row < rows; row++)
        {
            text.AddRow([Text.Label(table.States[row]), .. shown.Select(column => column[row + 1])]);
        }

        return $"Mean first passage times{Environment.NewLine}{text}{Rest(table.States.Count - rows, "row", "rows")}{Rest(table.States.Count - shown.Count, "column", "columns")}";
    }

    private static string Rest(int count, string singular, string plural) =>
        count > 0 ? $"{Environment.NewLine}… and {Text.Count(count, "more " + singular, "more " + plural)}" : string.Empty;
}
