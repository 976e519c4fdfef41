using System.Text.RegularExpressions;

namespace Snippets;

/// <summary>A named region of a snippet file.</summary>
/// <param name="File">The name of the file.</param>
/// <param name="Name">The name of the region.</param>
/// <param name="Text">Its lines, indented as little as possible.</param>
internal sealed partial record Region(string File, string Name, string Text)
{
    internal static IReadOnlyList<Region> All { get; } = [.. Directory.EnumerateFiles(Repository.Samples, "*.cs").Order(StringComparer.Ordinal).SelectMany(InFile)];

    private static IEnumerable<Region> InFile(string path) =>
        Pattern().Matches(Repository.Read(path)).Select(match => new Region(Path.GetFileName(path), match.Groups["name"].Value, Dedent(match.Groups["text"].Value)));

    private static string Dedent(string text)
    {
        var lines = text.Split('\n');
        var indent = lines.Where(line => line.Length > 0).Select(line => line.Length - line.TrimStart().Length).DefaultIfEmpty(0).Min();
        return string.Join('\n', lines.Select(line => line.Length > 0 ? line[indent..] : line)).Trim('\n');
    }

    [GeneratedRegex(@"^ *#region (?<name>\S+)\n(?<text>.*?)^ *#endregion", RegexOptions.Multiline | RegexOptions.Singleline)]
    private static partial Regex Pattern();
}
