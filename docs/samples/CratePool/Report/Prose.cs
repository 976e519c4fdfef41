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

    /// <summary>How many crates to expect: whole ones, unless they are few.</summary>
    internal static string Expected(double crates) => crates.ToString(crates >= 10 ? "N0" : "N1", CultureInfo.InvariantCulture);

    internal static string OneDecimal(double number) => double.IsFinite(number) ? number.ToString("N1", CultureInfo.InvariantCulture) : "never for sure";

    internal static string Date(DateTimeOffset time) => time.ToString("d MMMM yyyy", CultureInfo.InvariantCulture);

    internal static string List(IReadOnlyList<string> stages, string last) => stages.Count switch
    {
        0 => "none",
        1 => stages[0],
        _ => $"{string.Join(", ", stages.Take(stages.Count - 1))} {last} {stages[^1]}",
    };
}
