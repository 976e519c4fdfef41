using System.Globalization;

namespace CratePool.Report;

/// <summary>Headings and sentences of the report, wrapped to a readable width; numbers the same in every culture.</summary>
internal static class Prose
{
    private const int Width = 88;

    internal static void Heading(this TextWriter output, string text)
    {
        output.WriteLine(text);
        output.WriteLine(new string('=', text.Length));
        output.WriteLine();
    }

    internal static void Paragraph(this TextWriter output, string text)
    {
        var line = string.Empty;
        foreach (var word in text.Split(' '))
        {
            if (line.Length + word.Length >= Width)
            {
                output.WriteLine(line);
                line = string.Empty;
            }

            line += line.Length == 0 ? word : " " + word;
        }

        output.WriteLine(line);
        output.WriteLine();
    }

    internal static string Count(long number) => number.ToString("N0", CultureInfo.InvariantCulture);

    internal static string Count(long number, string one, string many) => $"{Count(number)} {(number == 1 ? one : many)}";

    internal static string Whole(double number) => number.ToString("N0", CultureInfo.InvariantCulture);

    internal static string OneDecimal(double number) => double.IsFinite(number) ? number.ToString("N1", CultureInfo.InvariantCulture) : "never for sure";

    internal static string Date(DateTimeOffset time) => time.ToString("d MMMM yyyy", CultureInfo.InvariantCulture);

    /// <summary>A bound in two digits, rounded up, so that the sentence stays true.</summary>
    internal static string Bound(double bound)
    {
        if (bound == 0 || !double.IsFinite(bound))
        {
            return bound.ToString(CultureInfo.InvariantCulture);
        }

        var unit = Math.Pow(10, Math.Floor(Math.Log10(bound)) - 1);
        return (Math.Ceiling(bound / unit) * unit).ToString("0.0E+0", CultureInfo.InvariantCulture);
    }

    internal static string List(IReadOnlyList<string> stages, string last) => stages.Count switch
    {
        0 => "none",
        1 => stages[0],
        _ => $"{string.Join(", ", stages.Take(stages.Count - 1))} {last} {stages[^1]}",
    };
}
