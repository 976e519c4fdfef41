using nietras.SeparatedValues;
using Stochastic.Chains.Estimation;
using Stochastic.Chains.Internal;

namespace Stochastic.Chains.Interchange;

/// <summary>Where the columns of an event log stand.</summary>
internal sealed record CsvHeader(int ColumnCount, int Item, int Time, int State)
{
    private const char ByteOrderMark = '\uFEFF';

    /// <summary>Finds the columns by their names, or reports those that are missing or repeated.</summary>
    internal static CsvHeader? Find(SepReader.Row row, long line, EventLogColumns columns, LogFaultCollector faults)
    {
        var names = new string[row.ColCount];
        for (var k = 0; k < names.Length; k++)
        {
            var field = row[k].Span.TrimStart(ByteOrderMark); // of a text that was read with it
            names[k] = (CsvField.IsWellFormed(field) ? CsvField.Text(field) : field).Trim().ToString();
        }

        var header = new CsvHeader(
            names.Length,
            Locate(columns.Item, names, line, faults),
            Locate(columns.Time, names, line, faults),
            Locate(columns.State, names, line, faults));
        return header.Item < 0 || header.Time < 0 || header.State < 0 ? null : header;
    }

    private static int Locate(string column, string[] names, long line, LogFaultCollector faults)
    {
        var first = Array.IndexOf(names, column);
        if (first < 0)
        {
            faults.Add(LogFaultKind.MissingColumn, [line], Messages.MissingColumn(column, line, names));
        }
        else if (Array.IndexOf(names, column, first + 1) >= 0)
        {
            faults.Add(LogFaultKind.RepeatedColumn, [line], Messages.RepeatedColumn(column, line));
            return -1;
        }

        return first;
    }
}
