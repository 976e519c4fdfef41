using System.Reflection;
using System.Runtime.CompilerServices;

namespace Stochastic.Chains.ArchitectureTests.House;

/// <summary>What users of the library see, by reflection.</summary>
internal static class PublicSurface
{
    internal const BindingFlags Everything =
        BindingFlags.Public | BindingFlags.NonPublic | BindingFlags.Instance | BindingFlags.Static | BindingFlags.DeclaredOnly;

    internal static Assembly Library => typeof(Chain<>).Assembly;

    internal static IReadOnlyList<Type> Types { get; } = [.. Library.GetExportedTypes().Order(Comparer<Type>.Create((x, y) => string.CompareOrdinal(x.FullName, y.FullName)))];

    /// <summary>The methods written by hand that users can call or override; accessors, operators and what a record generates are left out.</summary>
    internal static IEnumerable<MethodInfo> Methods(Type type) => type.GetMethods(Everything)
        .Where(method => IsVisible(method) && !method.IsSpecialName && !IsGenerated(method));

    internal static IEnumerable<PropertyInfo> Properties(Type type) => type.GetProperties(Everything)
        .Where(property => property.GetAccessors(nonPublic: true).Any(IsVisible) && !IsGenerated(property) && property.Name != "EqualityContract");

    internal static IEnumerable<ConstructorInfo> Constructors(Type type) => type.GetConstructors(Everything).Where(IsVisible);

    internal static bool IsVisible(MethodBase method) => method.IsPublic || method.IsFamily || method.IsFamilyOrAssembly;

    internal static bool IsGenerated(MemberInfo member) => member.IsDefined(typeof(CompilerGeneratedAttribute)) || member.Name.Contains('<', StringComparison.Ordinal);

    /// <summary>The name without the count of type parameters.</summary>
    internal static string NameOf(Type type) => type.Name.Split('`')[0];
}
