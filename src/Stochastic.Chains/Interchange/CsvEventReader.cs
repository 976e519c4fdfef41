using System.Globalization;
using System.Text;
using nietras.SeparatedValues;
using Stochastic.Chains.Estimation;
using Stochastic.Chains.Internal;

namespace Stochastic.Chains.Interchange;

/// <summary>Reads the events of a CSV log one by one, gathering the fault of every row it cannot read.</summary>
internal sealed class CsvEventReader(TextReader text, EventLogColumns columns, LogFaultCollector faults)
{
    private const char Quote = '"';

    private readonly TimeReader _times = new(columns);
    private readonly LabelPool _labels = new();
    private CsvHeader? _header;
    private long _nextLine = 1;

    /// <summary>Reads the log once. Rows with faults are left out and reported; the caller throws them at the end.</summary>
    internal IEnumerable<LogEvent<string, string>> Read()
    {
        using var reader = TryOpen();
        if (reader is null || !TryReadHeader(reader))
        {
            yield break;
        }

        var hasRows = false;
        while (TryMoveNext(reader))
        {
            var isBlank = IsBlank(reader.Current);
            hasRows |= !isBlank;
            if (!isBlank && TryReadEvent(reader.Current, out var entry))
            {
                yield return entry;
            }
        }

        if (!hasRows && !faults.HasFaults)
        {
            faults.Add(LogFaultKind.EmptyLog, [], Messages.EmptyLog);
        }
    }

    private SepReader? TryOpen()
    {
        try
        {
            return Sep.New(columns.Separator).Reader(options => options with
            {
                HasHeader = false,              // the header is read here, so that every fault in it can be reported
                DisableColCountCheck = true,    // so are ragged rows
                CultureInfo = CultureInfo.InvariantCulture,
            }).From(text);
        }
        catch (DecoderFallbackException) // opening reads the first rows
        {
            ReportEncoding();
            return null;
        }
    }

    private bool TryReadHeader(SepReader reader)
    {
        var line = 1L;
        while (TryMoveNext(reader))
        {
            if (!IsBlank(reader.Current))
            {
                _header = CsvHeader.Find(reader.Current, line, columns, faults);
                return _header is not null;
            }

            line++;
        }

        if (!faults.HasFaults)
        {
            faults.Add(LogFaultKind.EmptyLog, [], Messages.EmptyCsv);
        }

        return false;
    }

    private bool TryMoveNext(SepReader reader)
    {
        try
        {
            var hasRow = reader.MoveNext();
            _nextLine = hasRow ? reader.Current.LineNumberToExcl : _nextLine;
            return hasRow;
        }
        catch (NotSupportedException) // the reader's limit on the length of a row
        {
            faults.Add(LogFaultKind.UnreadableRow, [_nextLine], Messages.EndlessRow(_nextLine));
            return false;
        }
        catch (DecoderFallbackException)
        {
            ReportEncoding();
            return false;
        }
    }

    private void ReportEncoding() => faults.Add(LogFaultKind.UnreadableRow, [_nextLine], Messages.WrongEncoding(_nextLine));

    private bool TryReadEvent(SepReader.Row row, out LogEvent<string, string> entry)
    {
        entry = default;
        var line = row.LineNumberFrom;
        if (!HasWellFormedFields(row))
        {
            faults.Add(LogFaultKind.UnreadableRow, [line], Messages.UnreadableRow(line));
            return false;
        }

        if (row.ColCount != _header!.ColumnCount)
        {
            faults.Add(LogFaultKind.RaggedRow, [line], Messages.RaggedRow(line, row.ColCount, _header.ColumnCount));
            return false;
        }

        var item = CsvField.Text(row[_header.Item].Span);
        var state = CsvField.Text(row[_header.State].Span);
        var time = ReadTime(CsvField.Text(row[_header.Time].Span), line);
        if (item.IsWhiteSpace())
        {
            faults.Add(LogFaultKind.EmptyItem, [line], Messages.EmptyField(columns.Item, line));
        }

        if (state.IsWhiteSpace())
        {
            faults.Add(LogFaultKind.EmptyState, [line], Messages.EmptyField(columns.State, line));
        }

        if (time is null || item.IsWhiteSpace() || state.IsWhiteSpace())
        {
            return false;
        }

        entry = new LogEvent<string, string>(_labels.Get(item), time.Value, _labels.Get(state)) { Line = line };
        return true;
    }

    private DateTimeOffset? ReadTime(ReadOnlySpan<char> field, long line)
    {
        var problem = _times.TryRead(field, out var time);
        if (problem == TimeProblem.None)
        {
            return time;
        }

        var written = field.ToString();
        faults.Add(LogFaultKind.UnreadableTime, [line], problem switch
        {
            TimeProblem.NoTimeZone => Messages.TimeWithoutZone(written, line),
            TimeProblem.NeverComes => Messages.TimeNeverComes(written, line, columns.TimeZone!.Id),
            TimeProblem.ComesTwice => Messages.TimeComesTwice(written, line, columns.TimeZone!.Id),
            _ => Messages.UnreadableTime(written, line, columns.TimeFormats),
        });
        return null;
    }

    private static bool IsBlank(SepReader.Row row) => row.ColCount <= 1 && row.Span.IsWhiteSpace();

    private static bool HasWellFormedFields(SepReader.Row row)
    {
        if (!row.Span.Contains(Quote))
        {
            return true;
        }

        for (var k = 0; k < row.ColCount; k++)
        {
            if (!CsvField.IsWellFormed(row[k].Span))
            {
                return false;
            }
        }

        return true;
    }
}
