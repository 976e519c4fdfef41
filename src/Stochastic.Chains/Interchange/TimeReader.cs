using System.Globalization;
using Stochastic.Chains.Estimation;

namespace Stochastic.Chains.Interchange;

/// <summary>Why a time could not be read.</summary>
internal enum TimeProblem
{
    None,
    Format,
    NoTimeZone,
    NeverComes,
    ComesTwice,
}

/// <summary>Reads times in the invariant culture: those with an offset as they are, those without in the time zone of the log.</summary>
internal sealed class TimeReader(EventLogColumns columns)
{
    private static string[] Iso8601 =>
    [
        "yyyy-MM-dd'T'HH:mm:ss.FFFFFFFK",
        "yyyy-MM-dd HH:mm:ss.FFFFFFFK",
        "yyyy-MM-dd",
        "yyyy-MM-dd HH:mmK",
        "yyyy-MM-dd'T'HH:mmK",
        "yyyy-MM-dd HH:mm:ss.FFFFFFF zzz",
        "yyyy-MM-dd HH:mm:ss.FFFFFFFzz",
        "yyyy-MM-dd'T'HH:mm:ss.FFFFFFFzz",
        "yyyyMMdd'T'HHmmssK",
    ];

    private readonly string[] _formats = columns.TimeFormats.Count == 0 ? Iso8601 : [.. columns.TimeFormats];
    private int _lastFit;

    internal TimeProblem TryRead(ReadOnlySpan<char> text, out DateTimeOffset time)
    {
        if (TryFormat(text, _formats[_lastFit], out time) is var problem and not TimeProblem.Format)
        {
            return problem; // the rows of one file are mostly written alike
        }

        for (var k = 0; k < _formats.Length; k++)
        {
            problem = TryFormat(text, _formats[k], out time);
            if (problem != TimeProblem.Format)
            {
                _lastFit = k;
                return problem;
            }
        }

        return TimeProblem.Format;
    }

    private TimeProblem TryFormat(ReadOnlySpan<char> text, string format, out DateTimeOffset time)
    {
        time = default;
        if (!DateTime.TryParseExact(text, format, CultureInfo.InvariantCulture, DateTimeStyles.RoundtripKind, out var read))
        {
            return TimeProblem.Format;
        }

        if (read.Kind == DateTimeKind.Unspecified)
        {
            return PlaceInZone(read, out time);
        }

        // the text has an offset; a DateTime would hold it converted to this machine's zone, so it is read once more
        return DateTimeOffset.TryParseExact(text, format, CultureInfo.InvariantCulture, DateTimeStyles.None, out time)
            ? TimeProblem.None
            : TimeProblem.Format;
    }

    private TimeProblem PlaceInZone(DateTime local, out DateTimeOffset time)
    {
        time = default;
        if (columns.TimeZone is not { } zone)
        {
            return TimeProblem.NoTimeZone;
        }

        if (LocalTime.Instants(local, zone) is not ({ } earlier, { } later))
        {
            return TimeProblem.NeverComes;
        }

        if (earlier != later && columns.AmbiguousTimes == AmbiguousTimes.Refuse)
        {
            return TimeProblem.ComesTwice;
        }

        var utc = columns.AmbiguousTimes == AmbiguousTimes.Later ? later : earlier;
        if (utc < DateTime.MinValue.Ticks || utc > DateTime.MaxValue.Ticks)
        {
            return TimeProblem.Format;
        }

        time = new DateTimeOffset(local, new TimeSpan(local.Ticks - utc));
        return TimeProblem.None;
    }
}
