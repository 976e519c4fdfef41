using Microsoft.CodeAnalysis;
using Microsoft.CodeAnalysis.CSharp;
using Microsoft.CodeAnalysis.CSharp.Syntax;

namespace Stochastic.Chains.ArchitectureTests.House;

/// <summary>
/// Finds text made from numbers and dates in the culture of the machine: holes in interpolated strings outside string.Create and
/// FormattableString.Invariant, numbers added to a string, and ToString without a culture. Analyzers see the last only.
/// </summary>
internal static class CultureRule
{
    internal static int HolesSeen(CSharpCompilation compilation) =>
        compilation.SyntaxTrees.Sum(tree => tree.GetRoot().DescendantNodes().OfType<InterpolationSyntax>().Count());

    internal static IEnumerable<string> Violations(CSharpCompilation compilation) =>
        from tree in compilation.SyntaxTrees
        let model = compilation.GetSemanticModel(tree)
        from node in tree.GetRoot().DescendantNodes()
        where IsHole(node, model) || IsConcatenation(node, model) || IsBareToString(node, model)
        select $"{tree.FilePath}({node.GetLocation().GetLineSpan().StartLinePosition.Line + 1}): {node}";

    private static bool IsHole(SyntaxNode node, SemanticModel model) =>
        node is InterpolationSyntax hole && DependsOnCulture(model.GetTypeInfo(hole.Expression).Type) && !IsInvariant(hole);

    private static bool IsInvariant(InterpolationSyntax hole) =>
        hole.FirstAncestorOrSelf<InvocationExpressionSyntax>() is { Expression: MemberAccessExpressionSyntax call } invocation
        && invocation.ArgumentList.Arguments.Any(argument => argument.Expression == hole.Parent)
        && call.ToString() is "string.Create" or "FormattableString.Invariant";

    private static bool IsConcatenation(SyntaxNode node, SemanticModel model) =>
        node is BinaryExpressionSyntax { RawKind: (int)SyntaxKind.AddExpression } sum
        && model.GetTypeInfo(sum).Type?.SpecialType == SpecialType.System_String
        && (DependsOnCulture(model.GetTypeInfo(sum.Left).Type) || DependsOnCulture(model.GetTypeInfo(sum.Right).Type));

    private static bool IsBareToString(SyntaxNode node, SemanticModel model) =>
        node is InvocationExpressionSyntax { Expression: MemberAccessExpressionSyntax { Name.Identifier.Text: "ToString" } call } invocation
        && invocation.ArgumentList.Arguments.Count < 2
        && DependsOnCulture(model.GetTypeInfo(call.Expression).Type)
        && !invocation.ArgumentList.Arguments.Any(argument => model.GetTypeInfo(argument.Expression).Type?.Name == "CultureInfo");

    private static bool DependsOnCulture(ITypeSymbol? type) => type is INamedTypeSymbol { OriginalDefinition.SpecialType: SpecialType.System_Nullable_T } nullable
        ? DependsOnCulture(nullable.TypeArguments[0])
        : type is { TypeKind: TypeKind.Struct } && (type.SpecialType is >= SpecialType.System_SByte and <= SpecialType.System_Double or SpecialType.System_DateTime
            || type.Name is "DateTimeOffset" or "DateOnly" or "TimeOnly" or "BigInteger" or "Complex");
}
