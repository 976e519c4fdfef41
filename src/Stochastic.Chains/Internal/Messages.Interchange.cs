using System.Globalization;

namespace Stochastic.Chains.Internal;

/// <summary>The messages about files.</summary>
internal static partial class Messages
{
    internal const string EmptyCsv = "The log is empty: it has no header. Give a first row with the names of the columns.";

    private const int LongestQuotation = 60;

    internal static string FileNotFound(string path, string fullPath) =>
        $"There is no file {Text.Quoted(path)}; it was looked for at {Text.Quoted(fullPath)}. Correct the path.";

    internal static string SeparatorNotValid(char separator) =>
        $"The separator is the character {((int)separator).ToString(CultureInfo.InvariantCulture)}. Give a tab or a printable ASCII character other than the quote.";

    internal static string MissingColumn(string column, long line, IEnumerable<string> there) =>
        $"There is no column {Text.Quoted(column)} in the header (line {Text.Count(line)}); there are {string.Join(", ", there.Select(Text.Quoted))}. Correct the name, or the separator.";

    internal static string RepeatedColumn(string column, long line) =>
        $"The header (line {Text.Count(line)}) names column {Text.Quoted(column)} more than once. Rename all but one.";

    internal static string RaggedRow(long line, int fields, int columns) =>
        $"Line {Text.Count(line)} has {Text.Count(fields, "field", "fields")}; the header has {Text.Count(columns)}. Correct the row, or quote a field that holds the separator.";

    internal static string UnreadableRow(long line) =>
        $"The row that begins on line {Text.Count(line)} has a quote out of place. Close every quote, write quotes within a quoted field twice, and quote the whole of a field that holds any.";

    internal static string EndlessRow(long line) =>
        $"The row that begins on line {Text.Count(line)} does not end; nothing after it was read. Close its quote.";

    internal static string WrongEncoding(long line) =>
        $"The file is not UTF-8 on or after line {Text.Count(line)}; nothing after it was read. Open it with a StreamReader in its own encoding, and give that.";

    internal static string EmptyField(string column, long line) =>
        $"Column {Text.Quoted(column)} is empty on line {Text.Count(line)}. Give every event its item and its state.";

    internal static string UnreadableTime(string text, long line, IReadOnlyCollection<string> formats)
    {
        var expected = formats.Count == 0 ? "ISO 8601, such as 2024-05-06T14:30:00+02:00" : Text.List(formats);
        return $"The time {Quotation(text)} on line {Text.Count(line)} cannot be read as {expected}. Correct it, or give its format in EventLogColumns.TimeFormats.";
    }

    internal static string TimeWithoutZone(string text, long line) =>
        $"The time {Quotation(text)} on line {Text.Count(line)} has no offset, so it names no instant. Give its time zone in EventLogColumns.TimeZone.";

    internal static string TimeNeverComes(string text, long line, string zone) =>
        $"The time {Quotation(text)} on line {Text.Count(line)} never comes in {zone}: clocks are set forward past it. Correct it, or write its offset.";

    internal static string TimeComesTwice(string text, long line, string zone) =>
        $"The time {Quotation(text)} on line {Text.Count(line)} comes twice in {zone}: clocks are set back over it. Write its offset, or choose in EventLogColumns.AmbiguousTimes.";

    private static string Quotation(string text) => Text.Quoted(text.Length <= LongestQuotation ? text : string.Concat(text.AsSpan(0, LongestQuotation), "…"));
}
