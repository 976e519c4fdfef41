using System.Text.RegularExpressions;
using FluentAssertions;
using Xunit;

namespace Snippets;

/// <summary>Holds the pages to what is compiled and to files that exist.</summary>
public sealed partial class PageTests
{
    [Fact]
    public void EveryIncludedSnippetIsARegionWithText()
    {
        var included = Repository.Pages.SelectMany(page => CodeInclusion().Matches(Repository.Read(page))
            .Select(match => (File: Path.GetFileName(match.Groups["path"].Value), Region: match.Groups["region"].Value))).ToList();

        included.Should().HaveCountGreaterThan(20);
        included.Should().OnlyContain(snippet => Region.All.Any(region => region.File == snippet.File && region.Name == snippet.Region && region.Text.Length > 0));
    }

    [Fact]
    public void EveryRegionIsShownSomewhere()
    {
        var pages = string.Concat(Repository.Pages.Select(Repository.Read));

        Region.All.Where(region => region.File != "Readme.cs").Should().OnlyContain(region => pages.Contains($"{region.File}#{region.Name})]", StringComparison.Ordinal));
    }

    [Fact]
    public void EveryIncludedOutputExists()
    {
        var outputs = Repository.Pages.SelectMany(page => OutputInclusion().Matches(Repository.Read(page))
            .Select(match => Path.GetFullPath(match.Groups["path"].Value, Path.GetDirectoryName(page)!))).ToList();

        outputs.Should().HaveCountGreaterThan(20).And.OnlyContain(path => File.Exists(path));
    }

    [Fact]
    public void PagesIncludeTheirCodeFromSnippets() =>
        Repository.Pages.Where(page => Repository.Read(page).Contains("```csharp", StringComparison.Ordinal)).Should().BeEmpty();

    [Fact]
    public void ReadmeShowsTheCompiledExampleAndItsOutput()
    {
        var readme = Repository.Read(Path.Combine(Repository.Root, "README.md"));
        var example = Region.All.Single(region => region is { File: "Readme.cs", Name: "example" }).Text;
        var output = Repository.Read(Path.Combine(Repository.Samples, "Output", "Readme.Example.txt"));

        readme.Should().Contain($"```csharp\nusing Stochastic.Chains;\n\n{example}\n```\n");
        readme.Should().Contain($"```text\n{output}```\n");
        CodeBlock().Count(readme).Should().Be(1, "every other block of C# would be unchecked");
    }

    [Fact]
    public void EveryRelativeLinkLeadsToAFile()
    {
        var links = Repository.MarkdownFiles.SelectMany(file => Link().Matches(Repository.Read(file))
            .Select(match => match.Groups["target"].Value)
            .Where(target => !target.Contains(':', StringComparison.Ordinal))
            .Select(target => (File: Path.GetRelativePath(Repository.Root, file), Target: target, Path: Path.GetFullPath(target, Path.GetDirectoryName(file)!)))).ToList();

        links.Should().HaveCountGreaterThan(10);
        links.Where(link => !File.Exists(link.Path) && !Directory.Exists(link.Path)).Select(link => $"{link.File}: {link.Target}").Should().BeEmpty();
    }

    [GeneratedRegex(@"\[!code-csharp\[[^\]]*\]\((?<path>[^)#]+)#(?<region>[^)]+)\)\]")]
    private static partial Regex CodeInclusion();

    [GeneratedRegex(@"\[!code-text\[[^\]]*\]\((?<path>[^)]+)\)\]")]
    private static partial Regex OutputInclusion();

    [GeneratedRegex("```csharp")]
    private static partial Regex CodeBlock();

    [GeneratedRegex(@"(?<!\[!code-\w+)\[[^\]]*\]\((?<target>[^)\s#]+)(#[^)\s]*)?\)")]
    private static partial Regex Link();
}
