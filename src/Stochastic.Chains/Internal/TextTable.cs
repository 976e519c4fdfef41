using System.Text;

namespace Stochastic.Chains.Internal;

/// <summary>A plain-text table: the first column flush left, the others flush right, two spaces between.</summary>
internal sealed class TextTable(IReadOnlyList<string> header)
{
    private const int WidestLabel = 32;

    private readonly List<IReadOnlyList<string>> _rows = [header];

    internal void AddRow(IReadOnlyList<string> cells) => _rows.Add(cells);

    public override string ToString()
    {
        var widths = Enumerable.Range(0, header.Count).Select(column => _rows.Max(row => Shorten(row[column]).Length)).ToArray();
        var text = new StringBuilder();
        foreach (var row in _rows)
        {
            var cells = row.Select((cell, column) => column == 0 ? Shorten(cell).PadRight(widths[0]) : Shorten(cell).PadLeft(widths[column]));
            text.AppendLine(string.Join("  ", cells).TrimEnd());
        }

        return text.ToString().TrimEnd();
    }

    private static string Shorten(string cell) => cell.Length <= WidestLabel ? cell : string.Concat(cell.AsSpan(0, WidestLabel - 1), "…");
}
