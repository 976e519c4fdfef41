namespace Snippets;

/// <summary>Finds the files of the repository that this project was built from.</summary>
internal static class Repository
{
    private static readonly string[] NotOurs = ["bin", "obj", "_site", "api", "TestResults", "BenchmarkDotNet.Artifacts", "artifacts"];

    internal static string Root { get; } = FindRoot();

    internal static string Samples { get; } = Path.Combine(Root, "docs", "samples", "Snippets");

    /// <summary>The Markdown files of the repository, build outputs and hidden folders other than .github left out.</summary>
    internal static IReadOnlyList<string> MarkdownFiles { get; } = [.. FilesBelow(Root).Where(file => file.EndsWith(".md", StringComparison.Ordinal)).Order(StringComparer.Ordinal)];

    /// <summary>The pages of the documentation site.</summary>
    internal static IEnumerable<string> Pages { get; } = MarkdownFiles.Where(file => file.StartsWith(Path.Combine(Root, "docs"), StringComparison.Ordinal));

    /// <summary>A file's text with line ends as in the repository, whatever the checkout made of them.</summary>
    internal static string Read(string path) => File.ReadAllText(path).ReplaceLineEndings("\n");

    private static string FindRoot()
    {
        for (var folder = new DirectoryInfo(AppContext.BaseDirectory); folder is not null; folder = folder.Parent)
        {
            if (File.Exists(Path.Combine(folder.FullName, "Stochastic.Chains.sln")))
            {
                return folder.FullName;
            }
        }

        throw new InvalidOperationException($"No Stochastic.Chains.sln above {AppContext.BaseDirectory}.");
    }

    private static IEnumerable<string> FilesBelow(string folder)
    {
        var folders = Directory.EnumerateDirectories(folder).Where(path => IsOurs(Path.GetFileName(path)));
        return Directory.EnumerateFiles(folder).Concat(folders.SelectMany(FilesBelow));
    }

    private static bool IsOurs(string name) => name == ".github" || (name[0] != '.' && !NotOurs.Contains(name));
}
