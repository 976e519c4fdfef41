using System.Globalization;
using System.Reflection;
using System.Text;

namespace Stochastic.Chains.Benchmarks.Report;

/// <summary>Rows as text that any table program reads: a heading, then one line for each row, figures in full (RFC 4180).</summary>
internal static class CommaSeparated
{
    internal static string Of<TRow>(IEnumerable<TRow> rows)
    {
        var columns = typeof(TRow).GetProperties(BindingFlags.Instance | BindingFlags.Public);
        var text = new StringBuilder().AppendJoin(',', columns.Select(column => column.Name)).Append('\n');
        foreach (var row in rows)
        {
            text.AppendJoin(',', columns.Select(column => Cell(column.GetValue(row)))).Append('\n');
        }

        return text.ToString();
    }

    private static string Cell(object? value)
    {
        var text = Convert.ToString(value, CultureInfo.InvariantCulture) ?? string.Empty;
        return text.Contains(',', StringComparison.Ordinal) ? $"\"{text}\"" : text;
    }
}
