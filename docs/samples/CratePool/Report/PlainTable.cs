namespace CratePool.Report;

/// <summary>A plain table: the first column flush left, the others flush right under their headings.</summary>
internal sealed class PlainTable(params string[] headings)
{
    private const string Indent = "    ";
    private const string Gap = "   ";

    private readonly List<string[]> _rows = [];

    internal void Add(params string[] cells) => _rows.Add(cells);

    internal void Write(TextWriter output)
    {
        var widths = headings.Select((heading, column) => _rows.Append(headings).Max(row => row[column].Length)).ToArray();
        WriteRow(output, headings, widths);
        output.WriteLine(Indent + string.Join(Gap, widths.Select(width => new string('-', width))));
        foreach (var row in _rows)
        {
            WriteRow(output, row, widths);
        }

        output.WriteLine();
    }

    private static void WriteRow(TextWriter output, string[] cells, int[] widths)
    {
        var padded = cells.Select((cell, column) => column == 0 ? cell.PadRight(widths[0]) : cell.PadLeft(widths[column]));
        output.WriteLine((Indent + string.Join(Gap, padded)).TrimEnd());
    }
}
