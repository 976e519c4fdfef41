using Stochastic.Chains.ArchitectureTests.Sources;

namespace Stochastic.Chains.ArchitectureTests.Words;

/// <summary>The table in docs/decisions/words.md: a public name, its meaning, and who uses it so.</summary>
internal static class WordList
{
    internal static string File { get; } = Path.Combine(Repository.Root, "docs", "decisions", "words.md");

    internal static IReadOnlyList<(string Name, string Meaning, string UsedBy)> Read() =>
    [
        .. from line in System.IO.File.ReadLines(File)
           where line.StartsWith("| `", StringComparison.Ordinal)
           let cells = line.Trim().Trim('|').Split('|').Select(cell => cell.Trim()).ToArray()
           where cells.Length == 3 ? true : throw new FormatException($"This row of words.md has not three cells: {line}")
           select (cells[0].Trim('`'), cells[1], cells[2]),
    ];
}
