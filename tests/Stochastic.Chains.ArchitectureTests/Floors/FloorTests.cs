using Microsoft.CodeAnalysis;
using Microsoft.CodeAnalysis.CSharp;
using Microsoft.CodeAnalysis.CSharp.Syntax;
using Stochastic.Chains.ArchitectureTests.Sources;

namespace Stochastic.Chains.ArchitectureTests.Floors;

public class FloorTests
{
    private const int FewestReferences = 1500;
    private const int FewestTypes = 60;
    private const int FewestFolders = 8;

    private static readonly Lazy<IReadOnlyList<FloorReference>> References = new(() => FloorReference.In(LibrarySource.Library));

    [Fact]
    public void No_folder_uses_a_higher_floor_or_another_folder_of_its_own()
    {
        var references = References.Value;

        references.Count.Should().BeGreaterThan(FewestReferences, "the check must not pass by seeing nothing");
        references.Where(reference => !reference.IsAllowed).Select(reference => reference.ToString()).Should().BeEmpty();
    }

    [Fact]
    public void Every_folder_has_its_floor()
    {
        var folders = Types().Select(type => type.Folder).Distinct().ToList();

        folders.Should().HaveCountGreaterThanOrEqualTo(FewestFolders);
        folders.Should().BeSubsetOf(FloorPlan.Floors.Keys, "a new folder needs a floor in FloorPlan");
    }

    [Fact]
    public void References_are_seen_from_every_floor_above_the_ground()
    {
        var upper = Types().Select(type => type.Folder).Distinct().Where(folder => FloorPlan.Floors[folder] > 0).ToList();

        References.Value.Where(reference => !reference.Folders.Contains(reference.Folder)).Select(reference => reference.Folder).Distinct()
            .Should().Contain(upper.Where(folder => FloorPlan.Floors[folder] > 2), "solves and what stands on them use the model");
    }

    [Fact]
    public void Names_of_the_library_all_bind()
    {
        var names = Types().Select(type => type.Name).ToHashSet();
        var unbound =
            from tree in LibrarySource.Library.SyntaxTrees
            let model = LibrarySource.Library.GetSemanticModel(tree)
            from name in tree.GetRoot().DescendantNodes().OfType<SimpleNameSyntax>()
            where names.Contains(name.Identifier.Text) && name.FirstAncestorOrSelf<AttributeSyntax>() is null
            let info = model.GetSymbolInfo(name)
            where info.Symbol is null && info.CandidateSymbols.IsEmpty && model.GetTypeInfo(name).Type is null or IErrorTypeSymbol
            select $"{tree.FilePath}: {name}";

        names.Count.Should().BeGreaterThan(FewestTypes);
        unbound.Should().BeEmpty("a name that does not bind would escape the check of floors");
    }

    [Fact]
    public void Public_types_share_one_namespace_and_internals_have_that_of_their_folder()
    {
        var misplaced = Types().Where(type => type.IsPublic
            ? type.Namespace != "Stochastic.Chains"
            : type.Namespace != $"Stochastic.Chains.{type.Folder}" && (FloorPlan.Floors[type.Folder] < 2 || type.Namespace != "Stochastic.Chains"));

        misplaced.Select(type => $"{type.Folder}: {type.Namespace}.{type.Name}").Should().BeEmpty();
    }

    [Fact]
    public void The_two_lowest_floors_declare_nothing_public()
    {
        Types().Where(type => FloorPlan.Floors[type.Folder] < 2 && type.IsPublic).Select(type => type.Name).Should().BeEmpty();
    }

    [Fact]
    public void Only_partial_types_stand_in_several_folders_and_each_is_known()
    {
        var spread = Types().GroupBy(type => (type.Namespace, type.Name, type.Arity)).Where(parts => parts.Select(part => part.Folder).Distinct().Count() > 1);

        spread.Select(parts => parts.Key.Name).Should().BeSubsetOf(["Messages", "Chain"], "these two are made of parts by topic");
    }

    private static IReadOnlyList<(string Folder, string Namespace, string Name, int Arity, bool IsPublic)> Types() =>
    [
        .. from tree in LibrarySource.Library.SyntaxTrees
           where tree.FilePath.Length > 0
           let model = LibrarySource.Library.GetSemanticModel(tree)
           from declaration in tree.GetRoot().DescendantNodes().OfType<BaseTypeDeclarationSyntax>()
           where declaration.Parent is BaseNamespaceDeclarationSyntax or CompilationUnitSyntax
           let symbol = model.GetDeclaredSymbol(declaration)!
           select (LibrarySource.FolderOf(tree), symbol.ContainingNamespace.ToDisplayString(), symbol.Name, symbol.Arity, symbol.DeclaredAccessibility == Accessibility.Public),
    ];
}
