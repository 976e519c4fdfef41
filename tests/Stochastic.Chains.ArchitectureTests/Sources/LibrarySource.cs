using Microsoft.CodeAnalysis;
using Microsoft.CodeAnalysis.CSharp;

namespace Stochastic.Chains.ArchitectureTests.Sources;

/// <summary>The library's source, parsed and bound, so that rules can ask what each name in it means.</summary>
internal static class LibrarySource
{
    private const string ImplicitUsings = """
        global using System;
        global using System.Collections.Generic;
        global using System.IO;
        global using System.Linq;
        global using System.Net.Http;
        global using System.Threading;
        global using System.Threading.Tasks;
        """;

    private static readonly Lazy<MetadataReference[]> References = new(ReadReferences);
    private static readonly Lazy<CSharpCompilation> Bound = new(() => Compile(ReadFiles()));

    internal static CSharpCompilation Library => Bound.Value;

    /// <summary>Binds files given by their path inside the library's folder, such as Model/Chain.cs.</summary>
    internal static CSharpCompilation Compile(IEnumerable<(string Path, string Text)> files)
    {
        var options = new CSharpParseOptions(LanguageVersion.CSharp14);
        var trees = files.Append((Path: string.Empty, Text: ImplicitUsings)).Select(file => CSharpSyntaxTree.ParseText(file.Text, options, file.Path));
        return CSharpCompilation.Create("Rules", trees, References.Value, new CSharpCompilationOptions(OutputKind.DynamicallyLinkedLibrary, nullableContextOptions: NullableContextOptions.Enable));
    }

    /// <summary>The folder directly under the library's own in which a file stands; empty for the file of implicit usings.</summary>
    internal static string FolderOf(SyntaxTree tree) => tree.FilePath.Split('/')[0];

    private static IEnumerable<(string Path, string Text)> ReadFiles() =>
        from path in Directory.EnumerateFiles(Repository.LibraryFolder, "*.cs", SearchOption.AllDirectories)
        let inside = Path.GetRelativePath(Repository.LibraryFolder, path).Replace('\\', '/')
        where !inside.StartsWith("bin/", StringComparison.Ordinal) && !inside.StartsWith("obj/", StringComparison.Ordinal)
        select (inside, File.ReadAllText(path));

    private static MetadataReference[] ReadReferences() =>
    [
        .. from path in ((string)AppContext.GetData("TRUSTED_PLATFORM_ASSEMBLIES")!).Split(Path.PathSeparator)
           where !Path.GetFileName(path).StartsWith("Stochastic.Chains", StringComparison.Ordinal)
           select MetadataReference.CreateFromFile(path),
    ];
}
