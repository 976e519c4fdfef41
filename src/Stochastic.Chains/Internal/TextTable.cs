using System.Text;

namespace Stochastic.Chains.Internal;

/// <summary>A plain-text table: the first column flush left, the others flush right, two spaces between.</summary>
internal sealed class TextTable(IReadOnlyList<string> header)
{
    private const int WidestLine = 100;
    private const int Gap = 2;

    private readonly List<IReadOnlyList<string>> _rows = [header];

    internal void AddRow(IReadOnlyList<string> cells) => _rows.Add(cells);

    public override string ToString()
    {
        var widths = Enumerable.Range(0, header.Count).Select(column => _rows.Max(row => Text.Shorten(row[column]).Length)).ToArray();
        var shown = ColumnsThatFit(widths);
        var text = new StringBuilder();
        foreach (var row in _rows)
        {
            var cells = row.Take(shown).Select((cell, column) => column == 0 ? Text.Shorten(cell).PadRight(widths[0]) : Text.Shorten(cell).PadLeft(widths[column]));
            text.AppendLine(string.Join("  ", shown < widths.Length ? cells.Append("…") : cells).TrimEnd());
        }

        return text.ToString().TrimEnd();
    }

    /// <summary>How many leading columns fit on a line; those left out show as an ellipsis. The first two are always shown.</summary>
    private static int ColumnsThatFit(int[] widths)
    {
        var width = widths[0];
        for (var column = 1; column < widths.Length; column++)
        {
            width += Gap + widths[column];
            if (column > 1 && width > WidestLine)
            {
                return column;
            }
        }

        return widths.Length;
    }
}
