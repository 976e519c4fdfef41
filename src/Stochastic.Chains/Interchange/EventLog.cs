using System.Text;
using Stochastic.Chains.Estimation;
using Stochastic.Chains.Interchange;
using Stochastic.Chains.Internal;

namespace Stochastic.Chains;

/// <summary>Reads event logs from CSV files (RFC 4180): one row for each time an item was seen in a state.</summary>
/// <remarks>
/// <para>
/// Rows may stand in any order, and the file may be larger than memory allows to hold as text: it is read once, a row at a time. Quoted fields may hold
/// separators, line breaks and doubled quotes; lines end in LF, CR or CRLF; a byte order mark and blank lines are passed over. Blanks around a
/// field are taken off, blanks within its quotes are kept. A file is read as UTF-8, or as its byte order mark says; open one in another encoding
/// with a <see cref="StreamReader"/>.
/// </para>
/// <para>No row is left out silently: each that cannot be read is refused, with its line number.</para>
/// </remarks>
/// <example>
/// <code>
/// var columns = new EventLogColumns { Item = "crate", Time = "scanned_at", State = "stage" };
/// TransitionCounts&lt;string&gt; counts = EventLog.CountCsv("scans.csv", columns);
/// Chain&lt;string&gt; fitted = counts.ToChain();
/// </code>
/// </example>
public static class EventLog
{
    private const int BufferSize = 1 << 16;

    private static UTF8Encoding StrictUtf8 => new(encoderShouldEmitUTF8Identifier: false, throwOnInvalidBytes: true);

    /// <summary>Counts the moves in a CSV file; time only orders.</summary>
    /// <param name="path">The file.</param>
    /// <param name="columns">The names of its columns and how they are written.</param>
    /// <returns>The counts, with the account of the log in <see cref="TransitionCounts{TState}.Log"/>.</returns>
    /// <exception cref="EventLogException">There is no such file, or it has faults; all are listed with their line numbers.</exception>
    /// <exception cref="IOException">The file cannot be read.</exception>
    /// <example><code>var counts = EventLog.CountCsv("scans.csv", new EventLogColumns { Item = "crate", Time = "scanned_at", State = "stage" });</code></example>
    public static TransitionCounts<string> CountCsv(string path, EventLogColumns columns) => CountCsv(path, columns, new LogOptions<string>());

    /// <summary>Counts the moves in a CSV file, with options.</summary>
    /// <param name="path">The file.</param>
    /// <param name="columns">The names of its columns and how they are written.</param>
    /// <param name="options">The fixed step if there is one, what silence means, the list of states.</param>
    /// <returns>The counts, with the account of the log in <see cref="TransitionCounts{TState}.Log"/>.</returns>
    /// <exception cref="EventLogException">There is no such file, or it has faults; all are listed with their line numbers.</exception>
    /// <exception cref="InvalidChainException">The list of states has faults, or lacks a state that the options name.</exception>
    /// <exception cref="IOException">The file cannot be read.</exception>
    /// <exception cref="OperationCanceledException">The token of the options was cancelled.</exception>
    /// <example>
    /// <code>
    /// var options = new LogOptions&lt;string&gt; { Silence = new SilenceRule&lt;string&gt;(TimeSpan.FromDays(180), "lost") };
    /// var counts = EventLog.CountCsv("scans.csv", columns, options);
    /// </code>
    /// </example>
    public static TransitionCounts<string> CountCsv(string path, EventLogColumns columns, LogOptions<string> options)
    {
        Check(columns);
        ArgumentNullException.ThrowIfNull(options);
        CheckFile(path);
        using var stream = Open(path);
        using var text = new StreamReader(stream, StrictUtf8, detectEncodingFromByteOrderMarks: true, BufferSize);
        return Count(text, columns, options, () => stream.Length == 0 ? 1 : (double)stream.Position / stream.Length);
    }

    /// <summary>Counts the moves in CSV text; time only orders.</summary>
    /// <param name="text">The text, read to its end and then closed.</param>
    /// <param name="columns">The names of its columns and how they are written.</param>
    /// <returns>The counts, with the account of the log in <see cref="TransitionCounts{TState}.Log"/>.</returns>
    /// <exception cref="EventLogException">The text has faults; all are listed with their line numbers.</exception>
    public static TransitionCounts<string> CountCsv(TextReader text, EventLogColumns columns) => CountCsv(text, columns, new LogOptions<string>());

    /// <summary>Counts the moves in CSV text, with options.</summary>
    /// <param name="text">The text, read to its end and then closed.</param>
    /// <param name="columns">The names of its columns and how they are written.</param>
    /// <param name="options">The fixed step if there is one, what silence means, the list of states.</param>
    /// <returns>The counts, with the account of the log in <see cref="TransitionCounts{TState}.Log"/>.</returns>
    /// <exception cref="EventLogException">The text has faults; all are listed with their line numbers.</exception>
    /// <exception cref="InvalidChainException">The list of states has faults, or lacks a state that the options name.</exception>
    /// <exception cref="OperationCanceledException">The token of the options was cancelled.</exception>
    /// <example>
    /// <code>
    /// using var latin = new StreamReader("scans.csv", Encoding.Latin1);
    /// var counts = EventLog.CountCsv(latin, columns, new LogOptions&lt;string&gt;());
    /// </code>
    /// </example>
    public static TransitionCounts<string> CountCsv(TextReader text, EventLogColumns columns, LogOptions<string> options)
    {
        ArgumentNullException.ThrowIfNull(text);
        Check(columns);
        ArgumentNullException.ThrowIfNull(options);
        return Count(text, columns, options, static () => 0);
    }

    /// <summary>Reads the events of a CSV file one by one, to pass on or to change first.</summary>
    /// <param name="path">The file; opened when the events are enumerated.</param>
    /// <param name="columns">The names of its columns and how they are written.</param>
    /// <returns>
    /// The events in the order of their rows. Rows with faults are passed over at first, and refused together when the end is
    /// reached: use nothing made from the events before that.
    /// </returns>
    /// <exception cref="EventLogException">There is no such file; or, at the end of the events, it has faults: all are listed with their line numbers.</exception>
    /// <exception cref="IOException">The file cannot be read.</exception>
    /// <example>
    /// <code>
    /// var events = EventLog.ReadCsv("scans.csv", columns)
    ///     .Select(read => new LogEvent&lt;string, Stage&gt;(read.Item, read.Time, Enum.Parse&lt;Stage&gt;(read.State)) { Line = read.Line });
    /// TransitionCounts&lt;Stage&gt; counts = TransitionCounts.FromEvents(events);
    /// </code>
    /// </example>
    public static IEnumerable<LogEvent<string, string>> ReadCsv(string path, EventLogColumns columns)
    {
        Check(columns);
        CheckFile(path);
        return ReadFile(path, columns);
    }

    /// <summary>Reads the events of CSV text one by one, to pass on or to change first.</summary>
    /// <param name="text">The text; the events can be enumerated once, and it is closed after that.</param>
    /// <param name="columns">The names of its columns and how they are written.</param>
    /// <returns>
    /// The events in the order of their rows. Rows with faults are passed over at first, and refused together when the end is
    /// reached: use nothing made from the events before that.
    /// </returns>
    /// <exception cref="EventLogException">At the end of the events, the text has faults: all are listed with their line numbers.</exception>
    /// <example><code>foreach (var read in EventLog.ReadCsv(new StringReader(csv), columns)) { Console.WriteLine(read); }</code></example>
    public static IEnumerable<LogEvent<string, string>> ReadCsv(TextReader text, EventLogColumns columns)
    {
        ArgumentNullException.ThrowIfNull(text);
        Check(columns);
        return Read(text, columns);
    }

    private static TransitionCounts<string> Count(TextReader text, EventLogColumns columns, LogOptions<string> options, Func<double> fractionRead)
    {
        var faults = new LogFaultCollector();
        var counter = new EventCounter<string, string>(options, faults, fractionRead);
        foreach (var entry in new CsvEventReader(text, columns, faults).Read())
        {
            counter.Add(entry);
        }

        return counter.Count();
    }

    private static IEnumerable<LogEvent<string, string>> ReadFile(string path, EventLogColumns columns)
    {
        using var text = new StreamReader(Open(path), StrictUtf8, detectEncodingFromByteOrderMarks: true, BufferSize);
        foreach (var entry in Read(text, columns))
        {
            yield return entry;
        }
    }

    private static IEnumerable<LogEvent<string, string>> Read(TextReader text, EventLogColumns columns)
    {
        var faults = new LogFaultCollector();
        foreach (var entry in new CsvEventReader(text, columns, faults).Read())
        {
            yield return entry;
        }

        faults.ThrowIfAny();
    }

    private static FileStream Open(string path) =>
        new(path, FileMode.Open, FileAccess.Read, FileShare.ReadWrite, BufferSize, FileOptions.SequentialScan);

    private static void CheckFile(string path)
    {
        ArgumentException.ThrowIfNullOrWhiteSpace(path);
        if (!File.Exists(path))
        {
            var faults = new LogFaultCollector();
            faults.Add(LogFaultKind.FileNotFound, [], Messages.FileNotFound(path, Path.GetFullPath(path)));
            faults.ThrowIfAny();
        }
    }

    private static void Check(EventLogColumns columns)
    {
        ArgumentNullException.ThrowIfNull(columns);
        if (columns.Separator is not ('\t' or (>= ' ' and <= '~' and not '"')))
        {
            throw new ArgumentException(Messages.SeparatorNotValid(columns.Separator), nameof(columns));
        }
    }
}
