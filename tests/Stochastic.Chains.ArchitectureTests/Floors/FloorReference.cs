using Microsoft.CodeAnalysis;
using Microsoft.CodeAnalysis.CSharp;
using Microsoft.CodeAnalysis.CSharp.Syntax;
using Stochastic.Chains.ArchitectureTests.Sources;

namespace Stochastic.Chains.ArchitectureTests.Floors;

/// <summary>One place where a file names something that the library declares.</summary>
/// <param name="File">The file that names it, inside the library's folder.</param>
/// <param name="Line">The line, counted from 1.</param>
/// <param name="Name">What is named.</param>
/// <param name="Folders">The folders that declare it: several for a type in parts.</param>
internal sealed record FloorReference(string File, int Line, string Name, IReadOnlyList<string> Folders)
{
    internal string Folder => File.Split('/')[0];

    /// <summary>
    /// A partial type may be used by whoever may use one of its parts: Messages has parts for several topics, and Chain may get
    /// constructions on a higher floor. Its members are references of their own, and each stands in one folder.
    /// </summary>
    internal bool IsAllowed => Folders.Any(folder => FloorPlan.MayUse(Folder, folder));

    public override string ToString() => $"{File}({Line}) names {Name} of {string.Join(", ", Folders)}";

    /// <summary>All references in a compilation, extension methods and members of inferred types included.</summary>
    internal static IReadOnlyList<FloorReference> In(CSharpCompilation compilation) =>
    [
        .. from tree in compilation.SyntaxTrees
           where tree.FilePath.Length > 0
           let model = compilation.GetSemanticModel(tree)
           from name in tree.GetRoot().DescendantNodes().OfType<SimpleNameSyntax>()
           let symbol = Declared(model, name)
           where symbol is not null
           let folders = FoldersOf(symbol)
           where folders.Count > 0
           select new FloorReference(tree.FilePath, name.GetLocation().GetLineSpan().StartLinePosition.Line + 1, symbol.ToDisplayString(), folders),
    ];

    private static ISymbol? Declared(SemanticModel model, SimpleNameSyntax name)
    {
        var info = model.GetSymbolInfo(name);
        var symbol = (info.Symbol ?? info.CandidateSymbols.FirstOrDefault())?.OriginalDefinition;
        symbol = symbol is IMethodSymbol { ReducedFrom: { } extension } ? extension : symbol;
        return symbol is INamedTypeSymbol or IMethodSymbol { MethodKind: not MethodKind.LocalFunction } or IPropertySymbol or IFieldSymbol or IEventSymbol ? symbol : null;
    }

    private static List<string> FoldersOf(ISymbol symbol)
    {
        var places = symbol.DeclaringSyntaxReferences;
        places = places.IsEmpty && symbol.ContainingType is { } type ? type.DeclaringSyntaxReferences : places;
        return [.. places.Select(place => LibrarySource.FolderOf(place.SyntaxTree)).Distinct()];
    }
}
