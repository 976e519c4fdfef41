using System.Text;

namespace Stochastic.Chains.Internal;

/// <summary>A plain-text table: the first column flush left, the others flush right, two spaces between.</summary>
internal sealed class TextTable(IReadOnlyList<string> header)
{
    private readonly List<IReadOnlyList<string>> _rows = [header];

    internal void AddRow(IReadOnlyList<string> cells) => _rows.Add(cells);

    public override string ToString()
    {
        var widths = Enumerable.Range(0, header.Count).Select(column => _rows.Max(row => Text.Shorten(row[column]).Length)).ToArray();
        var text = new StringBuilder();
        foreach (var row in _rows)
        {
            var cells = row.Select((cell, column) => column == 0 ? Text.Shorten(cell).PadRight(widths[0]) : Text.Shorten(cell).PadLeft(widths[column]));
            text.AppendLine(string.Join("  ", cells).TrimEnd());
        }

        return text.ToString().TrimEnd();
    }
}
