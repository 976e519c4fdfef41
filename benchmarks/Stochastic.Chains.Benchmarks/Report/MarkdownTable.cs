using System.Text;

namespace Stochastic.Chains.Benchmarks.Report;

/// <summary>A table in Markdown.</summary>
internal static class MarkdownTable
{
    /// <summary>Rows of cells below a heading; a column whose heading ends with a colon is aligned right.</summary>
    internal static string Of(IReadOnlyList<string> heading, IEnumerable<IReadOnlyList<string>> rows)
    {
        var text = new StringBuilder();
        Add(text, heading.Select(cell => cell.TrimEnd(':')));
        Add(text, heading.Select(cell => cell.EndsWith(':') ? "---:" : "---"));
        foreach (var row in rows)
        {
            Add(text, row);
        }

        return text.ToString();
    }

    private static void Add(StringBuilder text, IEnumerable<string> cells) => text.Append("| ").AppendJoin(" | ", cells).Append(" |\n");
}
