using System.Globalization;

namespace Stochastic.Chains.Internal;

/// <summary>Writes labels and numbers into messages and tables, the same in every culture.</summary>
internal static class Text
{
    /// <summary>The most characters in a cell of a table.</summary>
    internal const int WidestCell = 32;

    private const int LabelsShown = 8;
    private const double RoundingInAdvice = 1e-12;

    /// <summary>A state's own text, in the invariant culture.</summary>
    internal static string Label(object? state) => state switch
    {
        null => "null",
        IFormattable formattable => formattable.ToString(null, CultureInfo.InvariantCulture),
        _ => state.ToString() ?? string.Empty,
    };

    /// <summary>A text as a table shows it: cut where it is longer than <see cref="WidestCell"/>.</summary>
    internal static string Shorten(string cell) => cell.Length <= WidestCell ? cell : string.Concat(cell.AsSpan(0, WidestCell - 1), "…");

    /// <summary>A state's text in single quotes, as messages name it.</summary>
    internal static string Quoted(object? state) => $"'{Label(state)}'";

    /// <summary>The first few of many states, quoted, with the count of the rest.</summary>
    internal static string List<T>(IEnumerable<T> states)
    {
        var all = states as IReadOnlyCollection<T> ?? [.. states];
        var shown = string.Join(", ", all.Take(LabelsShown).Select(state => Quoted(state)));
        return all.Count > LabelsShown ? $"{shown} and {Count(all.Count - LabelsShown)} more" : shown;
    }

    /// <summary>The shortest text that reads back as the same double.</summary>
    internal static string Number(double value) => value.ToString("R", CultureInfo.InvariantCulture);

    /// <summary>A few significant digits, for deviations and sizes in messages.</summary>
    internal static string Short(double value) => value.ToString("G4", CultureInfo.InvariantCulture);

    /// <summary>A few significant digits that are not below the value, but for rounding far below them: advice that is enough when followed.</summary>
    internal static string ShortAtLeast(double value)
    {
        var text = Short(value);
        var isEnough = double.Parse(text, CultureInfo.InvariantCulture) >= value - RoundingInAdvice;
        return isEnough ? text : Short(value * (1 + 1e-3));
    }

    /// <summary>A whole number with thousands separated by commas.</summary>
    internal static string Count(long value) => value.ToString("N0", CultureInfo.InvariantCulture);

    /// <summary>A count with its noun, in singular or plural.</summary>
    internal static string Count(long value, string singular, string plural) => $"{Count(value)} {(value == 1 ? singular : plural)}";
}
